using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits a crossover: a subject has both periods, with one treatment in each and not the same twice.</summary>
internal sealed class CrossoverAudit : PlacesAudit
{
    private readonly TwoGroups _treatment;
    private readonly string?[] _treatments;

    /// <summary>Takes the columns that the study names.</summary>
    public CrossoverAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
        : base(study, sheet, measured, study.Design.Period!, "design.period")
    {
        _treatment = study.Design.Treatment!;
        _treatments = RoleCells.Of(Cells, _treatment, "design.treatment");
    }

    /// <inheritdoc/>
    protected override IReadOnlyList<string> Groups =>
        [$"{_treatment.Index} then {_treatment.Reference}", $"{_treatment.Reference} then {_treatment.Index}"];

    /// <inheritdoc/>
    protected override string Completeness => $"samples of the periods '{Order.Order[0]}' and '{Order.Order[1]}'";

    /// <inheritdoc/>
    protected override Disposition? ProblemOf(int row) =>
        _treatments[row] is not { } treatment ? Disposition.RoleMissing
        : treatment == _treatment.Index || treatment == _treatment.Reference ? null : Disposition.RoleOfNoInterest;

    /// <inheritdoc/>
    protected override bool IsClear(SubjectPlaces subject)
    {
        string?[] first = TreatmentsOf(subject, 0);
        string?[] second = TreatmentsOf(subject, 1);
        return first.Length < 2 && second.Length < 2 && !first.Intersect(second).Any();
    }

    /// <inheritdoc/>
    protected override bool IsComplete(SubjectPlaces subject) => subject.Has(0) && subject.Has(1);

    /// <inheritdoc/>
    protected override int GroupOf(SubjectPlaces subject)
    {
        bool isIndex = (subject.Has(0) ? TreatmentsOf(subject, 0)[0] : TreatmentsOf(subject, 1)[0]) == _treatment.Index;
        return isIndex == subject.Has(0) ? 0 : 1;
    }

    private string?[] TreatmentsOf(SubjectPlaces subject, int period) => [.. subject.Places[period].Select(row => _treatments[row]).Distinct()];
}
