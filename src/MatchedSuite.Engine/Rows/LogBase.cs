namespace MatchedSuite.Engine.Rows;

/// <summary>Base of the logarithm an estimate is on; it decides how the ratio is computed.</summary>
public enum LogBase : short
{
    /// <summary>No logarithm: there is no ratio.</summary>
    None = 0,

    /// <summary>Natural logarithm.</summary>
    Natural = 1,

    /// <summary>Base 2.</summary>
    Two = 2,

    /// <summary>Base 10.</summary>
    Ten = 10,
}
