using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Running;

/// <summary>What a run found, for those who print and write it.</summary>
public sealed record FinishedRun
{
    /// <summary>Where the run is, or will be once it is committed.</summary>
    public required string Folder { get; init; }

    /// <summary>What was computed.</summary>
    public required AnalysisPlan Plan { get; init; }

    /// <summary>The matching.</summary>
    public required MatchingAudit Audit { get; init; }

    /// <summary>Endpoints read.</summary>
    public required int Endpoints { get; init; }

    /// <summary>Primary rows over all sets: endpoints times contrasts.</summary>
    public required int PrimaryRows { get; init; }

    /// <summary>Of these, the rows with a p-value.</summary>
    public required int TestedRows { get; init; }

    /// <summary>Which hypotheses were adjusted together, with counts of rejections.</summary>
    public required IReadOnlyList<HypothesisGroup> Groups { get; init; }

    /// <summary>How many endpoints differ at least, contrast by contrast.</summary>
    public required IReadOnlyList<GuaranteedDiscoveries> Guaranteed { get; init; }

    /// <summary>The first rows of the summary, smallest p first.</summary>
    public required IReadOnlyList<SummaryRow> Top { get; init; }

    /// <summary>Every warning.</summary>
    public required IReadOnlyList<string> Warnings { get; init; }

    /// <summary>The cautions that apply to this design.</summary>
    public required IReadOnlyList<string> Cautions { get; init; }
}
