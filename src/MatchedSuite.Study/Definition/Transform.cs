namespace MatchedSuite.Study.Definition;

/// <summary>Transform from the measured to the analysis scale.</summary>
public enum Transform
{
    /// <summary>As measured.</summary>
    None,

    /// <summary>Natural logarithm.</summary>
    Log,

    /// <summary>Logarithm to base 2.</summary>
    Log2,

    /// <summary>Logarithm to base 10.</summary>
    Log10,

    /// <summary>Square root.</summary>
    Sqrt,

    /// <summary>Normal scores of the midranks over all used samples (Blom).</summary>
    RankNormal,
}
