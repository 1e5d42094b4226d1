namespace MatchedSuite.Statistics;

/// <summary>What every test of one run has in common.</summary>
public sealed record TestOptions
{
    /// <summary>The usual choice: two-sided, 95 % confidence.</summary>
    public static TestOptions Default { get; } = new();

    /// <summary>Direction of the alternative.</summary>
    public Sides Sides { get; init; } = Sides.Two;

    /// <summary>Coverage of the intervals, strictly between 0 and 1.</summary>
    public double Confidence { get; init; } = 0.95;

    /// <summary>Random relabelings or sign flips where not all of them are listed; at least 1.</summary>
    public int Resamples { get; init; } = 9999;

    /// <summary>Seed of everything random; the same seed gives the same numbers on every machine.</summary>
    public long Seed { get; init; }

    /// <summary>
    /// Probability left outside at one end of an interval: half of 1 − confidence when two-sided, all of it when one-sided.
    /// So the interval excludes the null value exactly when p &lt; 1 − confidence.
    /// </summary>
    public double TailShare => Sides == Sides.Two ? (1 - Confidence) / 2 : 1 - Confidence;
}
