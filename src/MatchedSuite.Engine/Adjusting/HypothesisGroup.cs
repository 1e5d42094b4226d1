using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>Hypotheses that are adjusted together: the primary rows, or one secondary method's rows, of a contrast and stratum.</summary>
/// <param name="contrast">Position of the contrast in the plan, or <see cref="AllContrasts"/>.</param>
/// <param name="stratum">Position of the stratum, or <see cref="Rows.ResultRow.AllStrata"/>.</param>
/// <param name="method">Position of the secondary method, or <see cref="PrimaryMethods"/>.</param>
/// <param name="family">Name of the family; null when all families count together.</param>
public sealed class HypothesisGroup(short contrast, short stratum, short method, string? family)
{
    /// <summary>Stands for the primary method of each kind.</summary>
    public const short PrimaryMethods = -1;

    /// <summary>Stands for all contrasts together.</summary>
    public const short AllContrasts = -1;

    /// <summary>Position of the contrast in the plan, or <see cref="AllContrasts"/>.</summary>
    public short Contrast => contrast;

    /// <summary>Position of the stratum, or <see cref="Rows.ResultRow.AllStrata"/>.</summary>
    public short Stratum => stratum;

    /// <summary>Position of the secondary method, or <see cref="PrimaryMethods"/>.</summary>
    public short Method => method;

    /// <summary>Name of the family; null when all families count together.</summary>
    public string? Family => family;

    /// <summary>True for the primary rows over all sets, which a person reads first.</summary>
    public bool IsMain => Stratum == Rows.ResultRow.AllStrata && Method == PrimaryMethods;

    /// <summary>Number of hypotheses: the rows with a p-value.</summary>
    public int Hypotheses { get; internal set; }

    /// <summary>For each adjustment of the plan, how many hypotheses it rejects; null where it does not apply to the group.</summary>
    public int?[] Rejected { get; internal set; } = [];

    /// <summary>Estimated share of true null hypotheses; NaN where nothing was tested.</summary>
    public double TrueNullShare { get; internal set; } = double.NaN;

    /// <summary>Simes' p-value of the hypothesis that nothing in the group differs.</summary>
    public Probability SimesP { get; internal set; } = Probability.Missing;

    /// <summary>How the flips of each resampling adjustment went.</summary>
    internal List<FlipFacts> Flips { get; } = [];
}
