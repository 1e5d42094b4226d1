namespace MatchedSuite.Study.Definition;

/// <summary>The study file's key <c>analysis.sensitivity</c>: how far each finding can be trusted.</summary>
public sealed record SensitivitySection
{
    /// <summary>True where the largest hidden bias that leaves a finding standing is computed (Rosenbaum).</summary>
    public bool Gamma { get; init; }

    /// <summary>True where E-values of ratio measures are computed.</summary>
    public bool EValue { get; init; }

    /// <summary>True where every set is left out once.</summary>
    public bool Influence { get; init; }
}
