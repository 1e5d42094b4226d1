namespace MatchedSuite.Engine.Tables;

/// <summary>What is asked of the adjustment of a table of p-values.</summary>
public sealed record TableAdjustmentOptions
{
    /// <summary>The table: CSV, TSV or Parquet.</summary>
    public required string Table { get; init; }

    /// <summary>Name of the column with the p-values.</summary>
    public required string P { get; init; }

    /// <summary>Name of the column with the families; null adjusts all together.</summary>
    public string? Family { get; init; }

    /// <summary>Name of the column with the weights; null weighs all the same.</summary>
    public string? Weight { get; init; }

    /// <summary>Names of the adjustments, in the order of the columns.</summary>
    public IReadOnlyList<string> Methods { get; init; } = ["holm", "bh"];

    /// <summary>The level that an adjusted p-value is compared with.</summary>
    public double Level { get; init; } = 0.05;

    /// <summary>Name of the column with the names of the rows; null takes the first column.</summary>
    public string? Name { get; init; }
}
