using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits repeated visits: a subject counts once it has two of them.</summary>
internal sealed class VisitsAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
    : PlacesAudit(study, sheet, measured, study.Design.Visit!, "design.visit")
{
    /// <inheritdoc/>
    protected override string Completeness => "samples of two visits";

    /// <inheritdoc/>
    protected override bool IsComplete(SubjectPlaces subject) => subject.Places.Count(rows => rows.Count > 0) > 1;
}
