namespace MatchedSuite.Engine.Adjusting;

/// <summary>Hypotheses that are adjusted together: the primary rows, or one secondary method's rows, of a contrast and stratum.</summary>
/// <param name="Contrast">Position of the contrast in the plan.</param>
/// <param name="Stratum">Position of the stratum, or <see cref="Rows.ResultRow.AllStrata"/>.</param>
/// <param name="Method">Position of the secondary method, or <see cref="PrimaryMethods"/>.</param>
/// <param name="Family">Name of the family; null when all families count together.</param>
public sealed record HypothesisGroup(short Contrast, short Stratum, short Method, string? Family)
{
    /// <summary>Stands for the primary method of each kind.</summary>
    public const short PrimaryMethods = -1;

    /// <summary>Number of hypotheses: the rows with a p-value.</summary>
    public int Hypotheses { get; internal set; }

    /// <summary>For each adjustment of the plan, how many hypotheses it rejects.</summary>
    public int[] Rejected { get; internal set; } = [];
}
