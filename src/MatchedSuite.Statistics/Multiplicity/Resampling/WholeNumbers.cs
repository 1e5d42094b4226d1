namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>How one endpoint's differences become whole numbers whose signed sums fit into 32 bits, and what that loses.</summary>
/// <remarks>
/// Where all differences are multiples of one step, as ranks, codes, counts and coarse decimals are, they are counted in steps and
/// nothing is lost: two flips with equal sums then have equal whole-number sums, and their many ties need no second look. Other
/// differences are rounded to about 2^-31 of the sum of their sizes.
/// </remarks>
/// <param name="Multiplier">Scaled differences times this, rounded, are the whole numbers.</param>
/// <param name="Loss">How far any signed sum of scaled differences may be off.</param>
internal readonly record struct WholeNumbers(double Multiplier, double Loss)
{
    private const double LargestSum = int.MaxValue;

    // A step finer than this share of the largest difference has few ties to offer.
    private const double FinestStep = 1.0 / (1 << 13);

    // Left over by Euclid's algorithm where nothing should be: its quotients multiply to 2^13 at most, rounding is 2^-53.
    private const double Nothing = 1.0 / (1L << 38);

    /// <summary>Chooses the multiplier.</summary>
    /// <param name="differences">Differences, NaN where missing.</param>
    /// <param name="power">What scales the largest of them to between 1 and 2.</param>
    /// <param name="magnitude">Sum of the sizes of the scaled differences.</param>
    public static WholeNumbers Of(ReadOnlySpan<double> differences, double power, double magnitude)
    {
        double step = CommonStep(differences, power);
        double room = (LargestSum - differences.Length) / magnitude;
        double multiplier = step * room >= 1 ? Math.ScaleB(1, Math.ILogB(step * room)) / step : Math.ScaleB(1, Math.ILogB(room));
        double loss = 0;
        foreach (double difference in differences)
        {
            if (double.IsNaN(difference))
                continue;
            double scaled = difference * power * multiplier;
            loss += Math.Abs(scaled - Math.Round(scaled));
        }

        // The second term is the rounding of a sum of as many doubles.
        return new WholeNumbers(multiplier, loss / multiplier + Math.ScaleB(differences.Length * magnitude, -51));
    }

    // The largest step of which all scaled differences are multiples; 0 where there is none worth the name.
    private static double CommonStep(ReadOnlySpan<double> differences, double power)
    {
        double step = 0;
        double largest = 0;
        foreach (double difference in differences)
        {
            double size = Math.Abs(difference * power);
            if (!(size > Nothing))
                continue;
            largest = Math.Max(largest, size);
            step = CommonStep(size, step);
            if (step < FinestStep)
                return 0;
        }

        return step == 0 ? 0 : largest / Math.Round(largest / step);
    }

    private static double CommonStep(double larger, double smaller)
    {
        while (smaller > Nothing)
            (larger, smaller) = (smaller, Math.Abs(larger - Math.Round(larger / smaller) * smaller));
        return larger;
    }
}
