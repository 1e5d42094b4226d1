namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>What a resampling adjustment found; arrays have one entry an endpoint, in input order.</summary>
public sealed record ResamplingResult
{
    /// <summary>Step-down adjusted p-values, (1 + b)/(1 + B); missing where an endpoint has nothing to flip.</summary>
    public required IReadOnlyList<Probability> StepDown { get; init; }

    /// <summary>Single-step adjusted p-values, (1 + b)/(1 + B).</summary>
    public required IReadOnlyList<Probability> SingleStep { get; init; }

    /// <summary>
    /// b of the step-down: flips in which this or a less significant endpoint reaches the observed, or the b of a more significant
    /// endpoint where that is larger; −1 where missing.
    /// </summary>
    public required IReadOnlyList<int> StepDownExceedances { get; init; }

    /// <summary>b of the single step: flips in which any endpoint reaches the observed; −1 where missing.</summary>
    public required IReadOnlyList<int> SingleStepExceedances { get; init; }

    /// <summary>B, the flips or relabelings beside the data as they are.</summary>
    public required int Flips { get; init; }

    /// <summary>True where these are all there are, so the p-values are exact.</summary>
    public required bool Exhaustive { get; init; }

    /// <summary>
    /// The t (or score) that an endpoint must exceed for a single-step adjusted p at or below the level, so that estimate ± critical
    /// value × standard error are simultaneous intervals. Infinite where there are too few flips for the level, or t has no bound.
    /// </summary>
    public required double CriticalValue { get; init; }
}
