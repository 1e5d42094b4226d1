namespace MatchedSuite.Engine.Methods;

/// <summary>The forms that a comparison of visits can have.</summary>
[Flags]
public enum VisitForms
{
    /// <summary>None.</summary>
    None = 0,

    /// <summary>One visit with another.</summary>
    Difference = 1,

    /// <summary>A trend over all visits.</summary>
    Trend = 2,

    /// <summary>Any difference between visits.</summary>
    Omnibus = 4,
}
