namespace MatchedSuite.Statistics;

/// <summary>Direction of the alternative hypothesis: how the index role compares with the reference role.</summary>
public enum Sides
{
    /// <summary>They differ, in either direction.</summary>
    Two,

    /// <summary>Index is greater than reference.</summary>
    Greater,

    /// <summary>Index is less than reference.</summary>
    Less,
}
