namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>How the flips or relabelings of a resampling adjustment are drawn and compared.</summary>
public sealed record ResamplingOptions
{
    /// <summary>Seed of the flips or relabelings.</summary>
    public long Seed { get; init; }

    /// <summary>Random flips or relabelings beside the data as they are; where all there are, the data included, number at most one more, they are listed instead.</summary>
    public int Resamples { get; init; } = 9999;

    /// <summary>Direction of the alternative.</summary>
    public Sides Sides { get; init; } = Sides.Two;

    /// <summary>What is compared.</summary>
    public FlipStatistic Statistic { get; init; } = FlipStatistic.T;

    /// <summary>Familywise level of the critical value, strictly between 0 and 1.</summary>
    public double Level { get; init; } = 0.05;

    /// <summary>Threads to use; the results do not depend on it.</summary>
    public int Threads { get; init; } = Environment.ProcessorCount;

    /// <summary>Bytes to use for a panel of endpoints; the results do not depend on it.</summary>
    public long PanelMemory { get; init; } = 256L << 20;

    internal void Validate()
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(Resamples);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(Threads);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(PanelMemory);
        Require.OpenUnitInterval(Level);
    }
}
