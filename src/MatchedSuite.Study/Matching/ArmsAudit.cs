using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits change by arm: a subject has one arm, the reference visit and a later one.</summary>
internal sealed class ArmsAudit : PlacesAudit
{
    private readonly TwoGroups _arm;
    private readonly int _baseline;
    private readonly Dictionary<string, HashSet<string>> _armsOfSubject = new(StringComparer.Ordinal);

    /// <summary>Takes the columns that the study names.</summary>
    public ArmsAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
        : base(study, sheet, measured, study.Design.Visit!, "design.visit")
    {
        _arm = study.Design.Arm!;
        _baseline = Order.ReferencePosition;
        string?[] arms = RoleCells.Of(Cells, _arm, "design.arm");
        for (int row = 0; row < arms.Length; row++)
        {
            if (Subjects[row] is not { } subject)
                continue;
            if (!_armsOfSubject.TryGetValue(subject, out HashSet<string>? named))
                _armsOfSubject.Add(subject, named = []);
            if (arms[row] is { } arm)
                named.Add(arm);
        }
    }

    /// <inheritdoc/>
    protected override IReadOnlyList<string> Groups => [_arm.Index, _arm.Reference];

    /// <inheritdoc/>
    protected override string Completeness => $"samples of the visit '{Order.Order[_baseline]}' and another one";

    /// <inheritdoc/>
    protected override int BaselinePlace => _baseline;

    // The arm belongs to the subject: it may be written on one sample or on all of them.
    /// <inheritdoc/>
    protected override Disposition? ProblemOf(int row)
    {
        if (Subjects[row] is not { } subject)
            return null;
        HashSet<string> arms = _armsOfSubject[subject];
        return arms.Count == 0 ? Disposition.RoleMissing
            : arms.Count > 1 ? Disposition.InTwoArms
            : Groups.Contains(arms.First()) ? null : Disposition.RoleOfNoInterest;
    }

    /// <inheritdoc/>
    protected override bool IsComplete(SubjectPlaces subject) =>
        subject.Has(_baseline) && subject.Places.Count(rows => rows.Count > 0) > 1;

    /// <inheritdoc/>
    protected override int GroupOf(SubjectPlaces subject) => _armsOfSubject[subject.Subject].Contains(_arm.Index) ? 0 : 1;
}
