using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Methods;

/// <summary>A procedure that turns the p-values of one set of hypotheses into adjusted ones; missing ones stay missing and do not count.</summary>
public delegate void AdjustmentProcedure(ReadOnlySpan<Probability> p, Span<Probability> adjusted);

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
/// <param name="Procedure">The procedure itself.</param>
public sealed record Adjustment(string Name, ErrorRate Controls, AdjustmentProcedure Procedure)
{
    /// <summary>The name as it stands in column names: <c>p_two_stage_bh</c>.</summary>
    public string ColumnName => Name.Replace('-', '_');
}
