using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The matching, audited: what became of every row of the sample sheet, and the arrangement that a run uses.</summary>
/// <remarks>What each disposition means, and in which order they are given, stands in docs/matching.md.</remarks>
public sealed record MatchingAudit
{
    /// <summary>One disposition for each row of the sheet.</summary>
    public required Disposition[] Dispositions { get; init; }

    /// <summary>The rows for <c>audit/dispositions.parquet</c>.</summary>
    public required AuditedRow[] AuditTable { get; init; }

    /// <summary>Rows by disposition, all dispositions in their order; they add up to the rows read.</summary>
    public required DispositionCount[] Counts { get; init; }

    /// <summary>Which sample stands where in which set.</summary>
    public required Arrangement Arrangement { get; init; }

    /// <summary>Sets by the number of their samples in each role.</summary>
    public required SetShape[] Shapes { get; init; }

    /// <summary>How well the used sets match, one entry for each promise.</summary>
    public required MatchBalance[] Balance { get; init; }

    /// <summary>Complete sets that break a promise of the matching, whether or not they are used.</summary>
    public required ToleranceBreach[] Breaches { get; init; }

    /// <summary>Visits, arms, crossover: subjects by the places that they have samples in; null for other designs.</summary>
    public PlacePatterns? Patterns { get; init; }

    /// <summary>Visits whose day is not after that of the visit before, where the study names days.</summary>
    public OrderBreach[] OutOfOrder { get; init; } = [];

    /// <summary>Change by arm, crossover: how the two groups of subjects compare before treatment on the study's covariates.</summary>
    public GroupBalance[] GroupBalance { get; init; } = [];

    /// <summary>Gates of the study file that the matching breaks; a run with any ends with exit code 3.</summary>
    public required BrokenGate[] BrokenGates { get; init; }

    /// <summary>What a reader should know; with <c>--strict</c> any of them refuses the run.</summary>
    public required AuditWarning[] Warnings { get; init; }

    /// <summary>Rows with a role of interest.</summary>
    public required int RowsOfInterest { get; init; }

    /// <summary>Rows with a role of interest that ended without a complete set: the numerator of <c>gates.unmatched-at-most</c>.</summary>
    public required int RowsUnmatched { get; init; }

    /// <summary>Audits the matching of a study.</summary>
    /// <param name="study">The study.</param>
    /// <param name="sheet">Its sample sheet.</param>
    /// <param name="measured">Sample names of the file of measurements; null when the sheet holds the measurements.</param>
    /// <exception cref="RefusalException">The sheet contradicts the study file or itself, or no complete set is left.</exception>
    public static MatchingAudit Of(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured) =>
        study.Design switch
        {
            { Kind: DesignKind.Pairs } => new PairsAudit(study, sheet, measured).Run(),
            { Kind: DesignKind.Sets } => new SetsAudit(study, sheet, measured).Run(),
            { Kind: DesignKind.Visits } => new VisitsAudit(study, sheet, measured).Run(),
            { Kind: DesignKind.ChangeByArm } => new ArmsAudit(study, sheet, measured).Run(),
            { Kind: DesignKind.Crossover } => new CrossoverAudit(study, sheet, measured).Run(),
            _ => throw new ArgumentException($"There is no audit for a design of kind '{WrittenName.Of(study.Design.Kind)}'.", nameof(study)),
        };
}
