namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>How the signed sums of one endpoint become comparable with those of every other endpoint.</summary>
/// <remarks>
/// <para>Flips change the sum S of an endpoint's differences but never n or Q = Σd². With r = S/√(n·Q), t² = (n − 1)·r²/(1 − r²).
/// Endpoints are compared by t, and t grows with w = t²/(N − 1 + t²), N the number of all sets, which stays within [−1, 1] and is
/// r² itself where no set is missing: w = r²/(1 + k − k·r²), k = (N − n)/(n − 1). Scores use r = S/√Q and k = 0; where labels
/// move, Q is the variance of S over them. One-sided statistics keep the sign of S.</para>
/// <para>All sums are of differences times a power of two, so that no unit of measurement overflows or loses digits.</para>
/// </remarks>
internal readonly struct EndpointScale
{
    // Equal but for the rounding of their sums: such flips count as ties, as in the marginal test. The second term, in units of r,
    // is what rounding can leave of a sum of zero.
    private const double TieTolerance = 1e-9;
    private const double ZeroTolerance = 1e-12;

    private const int LargestExponent = 1023;

    private EndpointScale(double power, double factor, double bend, in WholeNumbers whole, double observed, int sets)
    {
        Power = power;
        Factor = factor;
        Bend = bend;
        Multiplier = whole.Multiplier;
        Rounding = whole.Loss * factor;
        Observed = observed;
        Sets = sets;
    }

    /// <summary>The power of two that differences are multiplied by, so that the largest lies near 1.</summary>
    public double Power { get; }

    /// <summary>r per unit of S.</summary>
    public double Factor { get; }

    /// <summary>k: how much missing sets bend r² into w.</summary>
    public double Bend { get; }

    /// <summary>What the scaled differences are multiplied by before they are rounded to whole numbers.</summary>
    public double Multiplier { get; }

    /// <summary>How far r of any flip may be off by that rounding.</summary>
    public double Rounding { get; }

    /// <summary>w of the data as they are.</summary>
    public double Observed { get; }

    /// <summary>Sets that have the endpoint.</summary>
    public int Sets { get; }

    /// <summary>False where there is nothing to flip: every difference is zero or missing, or t has no degree of freedom.</summary>
    public bool IsTested => Sets > 0;

    /// <summary>Measures one endpoint.</summary>
    /// <param name="differences">N differences, NaN where missing.</param>
    /// <param name="options">What is compared, in which direction.</param>
    /// <param name="patterns">The sign patterns it is followed through.</param>
    public static EndpointScale Of(ReadOnlySpan<double> differences, ResamplingOptions options, ISignPatterns patterns)
    {
        double largest = 0;
        int sets = 0;
        foreach (double difference in differences)
        {
            if (double.IsNaN(difference))
                continue;
            largest = Math.Max(largest, Math.Abs(difference));
            sets++;
        }

        bool isT = options.Statistic == FlipStatistic.T;
        if (largest == 0 || (isT && sets < 2))
            return default;
        double power = Math.ScaleB(1, Math.Min(LargestExponent, -Math.ILogB(largest)));
        double magnitude = 0, sum = 0;
        foreach (double difference in differences)
        {
            if (double.IsNaN(difference))
                continue;
            double scaled = difference * power;
            magnitude += Math.Abs(scaled);
            sum += scaled;
        }

        double squares = patterns.Variance(differences, power);
        double factor = 1 / Math.Sqrt(isT ? sets * squares : squares);
        double bend = isT ? (double)(differences.Length - sets) / (sets - 1) : 0;
        double directed = options.Sides == Sides.Less ? -sum : sum;
        var whole = WholeNumbers.Of(differences, power, magnitude);
        return new EndpointScale(power, factor, bend, whole, Comparable(directed, factor, bend, options.Sides), sets);
    }

    /// <summary>w of a signed sum.</summary>
    public double Comparable(double sum, Sides sides) => Comparable(sum, Factor, Bend, sides);

    /// <summary>The smallest w that counts as having reached the observed one.</summary>
    public double Threshold()
    {
        double tied = Tied(Math.CopySign(Math.Sqrt(Math.Abs(Observed)), Observed), 1);
        return tied * Math.Abs(tied);
    }

    /// <summary>The smallest sum that counts as having reached <paramref name="sum"/>.</summary>
    public double TiedSum(double sum) => Tied(sum, Factor);

    /// <summary>The t that w stands for where N sets are in play; scores are their own square root.</summary>
    public static double StatisticOf(double w, int sets, FlipStatistic statistic)
    {
        double square = Math.Abs(w);
        double size = statistic == FlipStatistic.Score
            ? Math.Sqrt(square)
            : square < 1 ? Math.Sqrt((sets - 1) * square / (1 - square)) : double.PositiveInfinity;
        return Math.CopySign(size, w);
    }

    private static double Tied(double value, double factor) => value - TieTolerance * Math.Abs(value) - ZeroTolerance / factor;

    private static double Comparable(double sum, double factor, double bend, Sides sides)
    {
        double r = sum * factor;
        double square = sides == Sides.Two ? r * r : r * Math.Abs(r);
        return square / (1 + bend - bend * Math.Min(1, Math.Abs(square)));
    }
}
