using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits a design of pairs, check by check; a row keeps the first disposition it is given.</summary>
internal sealed class PairsAudit
{
    private readonly StudyDefinition _study;
    private readonly SheetCells _cells;
    private readonly SampleNames _names;
    private readonly string?[] _sets;
    private readonly string?[] _roleCells;
    private readonly string?[] _roles;
    private readonly TwoGroups _groups;
    private readonly string?[]? _persons;
    private readonly string?[]? _strata;
    private readonly Disposition[] _dispositions;
    private readonly List<AuditWarning> _warnings = [];

    /// <summary>Takes the columns that the study names.</summary>
    public PairsAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
    {
        DesignSection design = study.Design;
        _study = study;
        _cells = new SheetCells(sheet, study.Data.Dialect);
        _sets = _cells.Column(design.Set!, "design.set");
        _persons = design.Subject is { } subject ? _cells.Column(subject, "design.subject") : null;
        _strata = design.Stratum is { } stratum ? _cells.Column(stratum, "design.stratum") : null;
        foreach (string covariate in design.Covariates)
            _cells.Column(covariate, "design.covariates");
        if (design.PersonTime is { } time)
            _cells.Column(time, "design.person-time");
        _groups = design.Role ?? ExposureRoles.Groups(design.Exposure!);
        _roleCells = design.Role is null ? _cells.Column(design.Exposure!, "design.exposure.column") : RoleCells.Of(_cells, design.Role, "design.role");
        _roles = design.Role is null ? ExposureRoles.Of(_sets, _roleCells, _persons) : _roleCells;
        _names = SampleNames.Of(_cells, study.Data, measured);
        _dispositions = new Disposition[_cells.Rows];
    }

    private DesignSection Design => _study.Design;

    /// <summary>Runs the checks in their order.</summary>
    public MatchingAudit Run()
    {
        MatchPromise[] promises = [.. Design.MatchOn.Select(rule => new MatchPromise(rule, _cells, IsOfInterest))];
        MarkRows();
        MarkPersons();
        List<PairMembers> sets = PairSets.Of(_dispositions, _sets, _roles, _groups);
        SetShape[] shapes = PairSets.Shapes(sets);
        PairSets.Settle(sets, _dispositions, Design, _persons, _cells);
        List<PairMembers> pairs = Leave(sets, set => set.Complete, Disposition.NoPartner);
        RequirePairs(pairs, "no set has a sample in both roles");
        int unmatched = CountUnmatched(pairs);
        ToleranceBreach[] breaches = Breaches(promises, pairs);
        HashSet<string> outside = [.. breaches.Select(breach => breach.Set)];
        if (_study.Gates.Tolerance == Tolerance.Drop)
            pairs = Leave(pairs, pair => !outside.Contains(pair.Set), Disposition.OutsideTolerance);
        if (_strata is not null)
            pairs = Leave(pairs, pair => StratumCells.Of(pair.Rows, _strata) is not null, Disposition.StratumUnclear);
        RequirePairs(pairs, "every complete pair is outside the tolerance or has an unclear stratum");
        WarnOfSets(promises, pairs, outside.Count);
        int ofInterest = Enumerable.Range(0, _cells.Rows).Count(IsOfInterest);
        return new MatchingAudit
        {
            Dispositions = _dispositions,
            AuditTable = [.. _dispositions.Select((disposition, row) => new AuditedRow(row + 1, _names[row], _sets[row], _roleCells[row], disposition))],
            Counts = [.. Enum.GetValues<Disposition>().Select(kind => new DispositionCount(kind, Count(kind)))],
            Arrangement = PairArrangement.Of(pairs, _groups, _strata),
            Shapes = shapes,
            Balance = [.. promises.Select(promise => promise.BalanceOf(pairs))],
            Breaches = breaches,
            BrokenGates = [.. AuditGates.Broken(_study.Gates, unmatched, ofInterest, outside.Count)],
            Warnings = [.. _warnings],
            RowsOfInterest = ofInterest,
            RowsUnmatched = unmatched,
        };
    }

    private bool IsOfInterest(int row) => _roles[row] == _groups.Index || _roles[row] == _groups.Reference;

    private void MarkRows()
    {
        for (int row = 0; row < _dispositions.Length; row++)
        {
            _dispositions[row] = _sets[row] is null ? Disposition.SetMissing
                : _roles[row] is null ? Disposition.RoleMissing
                : !IsOfInterest(row) ? Disposition.RoleOfNoInterest
                : !_names.Measured(row) ? Disposition.NotInValues
                : Disposition.Used;
        }

        Warn("not-in-values", Count(Disposition.NotInValues), "sample of interest has no measurements", "samples of interest have no measurements");
    }

    private void MarkPersons()
    {
        if (_persons is null)
            return;
        int unknown = PersonCheck.Mark(_dispositions, _sets, _persons);
        Warn("person-in-two-sets", Count(Disposition.PersonInTwoSets), "sample is of a person who already stands in another set; it is left out", "samples are of people who already stand in another set; they are left out");
        Warn("person-missing", unknown, $"sample has no person in the column '{Design.Subject}' and was not checked for use in two sets", $"samples have no person in the column '{Design.Subject}' and were not checked for use in two sets");
    }

    private List<PairMembers> Leave(List<PairMembers> sets, Func<PairMembers, bool> stays, Disposition reason)
    {
        foreach (int row in sets.Where(set => !stays(set)).SelectMany(set => set.Rows))
            _dispositions[row] = reason;
        return [.. sets.Where(stays)];
    }

    // A replicate that was left out has found its set when the set is complete.
    private int CountUnmatched(List<PairMembers> pairs)
    {
        HashSet<string> complete = [.. pairs.Select(pair => pair.Set)];
        return Enumerable.Range(0, _cells.Rows).Count(row => IsOfInterest(row) && _dispositions[row] switch
        {
            Disposition.Used => false,
            Disposition.DuplicatePlace => !complete.Contains(_sets[row]!),
            _ => true,
        });
    }

    private static ToleranceBreach[] Breaches(MatchPromise[] promises, List<PairMembers> pairs) =>
        [.. pairs.SelectMany(pair => promises.Select(promise => promise.BreachOf(pair)).OfType<ToleranceBreach>())];

    private void WarnOfSets(MatchPromise[] promises, List<PairMembers> pairs, int outside)
    {
        if (_study.Gates.Tolerance == Tolerance.Report)
            Warn("outside-tolerance", outside, "set is outside match-on and is used", "sets are outside match-on and are used");
        Warn("match-unknown", pairs.Count(pair => promises.Any(promise => !promise.IsKnown(pair))), "used set lacks a value that match-on would check", "used sets lack a value that match-on would check");
        Warn("stratum-unclear", Count(Disposition.StratumUnclear), "sample stands in a set whose stratum is missing or contradictory; it is left out", "samples stand in sets whose stratum is missing or contradictory; they are left out");
    }

    private void Warn(string code, int count, string one, string several)
    {
        if (count > 0)
            _warnings.Add(new AuditWarning(code, $"{count} {(count == 1 ? one : several)}."));
    }

    private int Count(Disposition kind) => _dispositions.Count(disposition => disposition == kind);

    private void RequirePairs(List<PairMembers> pairs, string reason)
    {
        if (pairs.Count > 0)
            return;
        string flow = string.Join(", ", Enum.GetValues<Disposition>().Where(kind => Count(kind) > 0).Select(kind => $"{Count(kind)} {WrittenName.Of(kind)}"));
        throw new RefusalException(
            _cells.File,
            $"{reason} (rows: {flow})",
            $"at least one value of '{Design.Set}' with one sample '{_groups.Index}' and one '{_groups.Reference}' in '{_groups.Column}'",
            "Check design.set and design.role.");
    }
}
