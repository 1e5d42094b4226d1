namespace MatchedSuite.Engine.Methods;

/// <summary>What an adjustment keeps below its level.</summary>
public enum ErrorRate
{
    /// <summary>The probability of any false discovery; compared with <c>alpha</c>.</summary>
    FamilyWise,

    /// <summary>The expected share of false discoveries; compared with <c>fdr</c>.</summary>
    FalseDiscovery,
}

/// <summary>One adjustment, as the study file names it.</summary>
/// <param name="Name">Its name in the study file.</param>
/// <param name="Controls">The error rate it controls.</param>
public abstract record Adjustment(string Name, ErrorRate Controls)
{
    /// <summary>The name as it stands in column names: <c>p_two_stage_bh</c>.</summary>
    public string ColumnName => Name.Replace('-', '_');
}
