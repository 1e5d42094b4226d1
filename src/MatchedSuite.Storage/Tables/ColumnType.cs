namespace MatchedSuite.Storage.Tables;

/// <summary>Type of one column of a written table.</summary>
public enum ColumnType
{
    /// <summary>Text; null is written as an empty cell.</summary>
    Text,

    /// <summary>A 32-bit integer.</summary>
    Integer,

    /// <summary>A double; NaN is written as null (an empty cell).</summary>
    Real,

    /// <summary>True or false.</summary>
    Truth,
}
