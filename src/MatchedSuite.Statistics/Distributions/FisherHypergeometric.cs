namespace MatchedSuite.Statistics.Distributions;

/// <summary>Fisher's noncentral hypergeometric distribution: the first cell of a 2 × 2 table with all margins and the odds ratio given.</summary>
/// <remarks>
/// P(x) is proportional to C(r, x)·C(N − r, c − x)·ψ^x. Weights are taken from neighbour to neighbour starting at the mode,
/// where they are largest, so nothing overflows. Source: Fisher (1935), Journal of the Royal Statistical Society 98, 39-82.
/// </remarks>
internal readonly ref struct FisherHypergeometric
{
    private readonly Span<double> _logarithms;
    private readonly Span<double> _weights;

    /// <summary>The distribution with given margins.</summary>
    /// <param name="row">r: sum of the first row.</param>
    /// <param name="column">c: sum of the first column.</param>
    /// <param name="total">N.</param>
    /// <param name="frame">Working memory that outlives the distribution.</param>
    public FisherHypergeometric(int row, int column, int total, in Scratch.Frame frame)
    {
        Smallest = Math.Max(0, row + column - total);
        Largest = Math.Min(row, column);
        _logarithms = frame.Doubles(Largest - Smallest + 1);
        _weights = frame.Doubles(Largest - Smallest + 1);
        _logarithms[0] = 0;
        for (int x = Smallest; x < Largest; x++)
        {
            double ratio = (double)(row - x) * (column - x) / ((x + 1.0) * (total - row - column + x + 1.0));
            _logarithms[x + 1 - Smallest] = _logarithms[x - Smallest] + Math.Log(ratio);
        }
    }

    /// <summary>Smallest possible cell.</summary>
    public int Smallest { get; }

    /// <summary>Largest possible cell.</summary>
    public int Largest { get; }

    /// <summary>P(X ≤ x) and P(X ≥ x).</summary>
    public (Probability Lower, Probability Upper) Tails(int x, double logOdds)
    {
        double all = Weigh(logOdds), lower = Sum(_weights[..(x - Smallest + 1)]), upper = Sum(_weights[(x - Smallest)..]);
        return (Probability.Of(Math.Min(1, lower / all)), Probability.Of(Math.Min(1, upper / all)));
    }

    /// <summary>Mean of the cell.</summary>
    public double Mean(double logOdds)
    {
        double all = Weigh(logOdds), sum = 0;
        for (int i = 0; i < _weights.Length; i++)
            sum += (Smallest + i) * _weights[i];
        return sum / all;
    }

    private double Weigh(double logOdds)
    {
        double highest = double.NegativeInfinity;
        for (int i = 0; i < _weights.Length; i++)
            highest = Math.Max(highest, _logarithms[i] + i * logOdds);
        for (int i = 0; i < _weights.Length; i++)
            _weights[i] = Math.Exp(_logarithms[i] + i * logOdds - highest);
        return Sum(_weights);
    }

    private static double Sum(ReadOnlySpan<double> values)
    {
        double sum = 0;
        foreach (double value in values)
            sum += value;
        return sum;
    }
}
