using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits a design with an index and a reference role, check by check; a row keeps the first disposition it is given.</summary>
internal abstract class RolesAudit
{
    private readonly string?[] _roleCells;
    private readonly string?[] _roles;
    private readonly List<AuditWarning> _warnings = [];

    /// <summary>Takes the columns that the study names.</summary>
    protected RolesAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
    {
        DesignSection design = study.Design;
        Study = study;
        Cells = new SheetCells(sheet, study.Data.Dialect);
        Sets = Cells.Column(design.Set!, "design.set");
        Persons = design.Subject is { } subject ? Cells.Column(subject, "design.subject") : null;
        Strata = design.Stratum is { } stratum ? Cells.Column(stratum, "design.stratum") : null;
        foreach (string covariate in design.Covariates)
            Cells.Column(covariate, "design.covariates");
        if (design.PersonTime is { } time)
            Cells.Column(time, "design.person-time");
        Groups = design.Role ?? ExposureRoles.Groups(design.Exposure!);
        _roleCells = design.Role is null ? Cells.Column(design.Exposure!, "design.exposure.column") : RoleCells.Of(Cells, design.Role, "design.role");
        _roles = design.Role is null ? ExposureRoles.Of(Sets, _roleCells, Persons) : _roleCells;
        Names = SampleNames.Of(Cells, study.Data, measured, design.ReuseAllowed ? Sets : null);
        Dispositions = new Disposition[Cells.Rows];
    }

    /// <summary>The study.</summary>
    protected StudyDefinition Study { get; }

    /// <summary>The sheet.</summary>
    protected SheetCells Cells { get; }

    /// <summary>Names of the samples.</summary>
    protected SampleNames Names { get; }

    /// <summary>Name of each row's set; null where missing.</summary>
    protected string?[] Sets { get; }

    /// <summary>The two roles.</summary>
    protected TwoGroups Groups { get; }

    /// <summary>Name of each row's person, null where missing; null where the study names no such column.</summary>
    protected string?[]? Persons { get; init; }

    /// <summary>Stratum of each row; null where the study has none.</summary>
    protected string?[]? Strata { get; }

    /// <summary>What became of each row so far.</summary>
    protected Disposition[] Dispositions { get; }

    private DesignSection Design => Study.Design;

    /// <summary>Runs the checks in their order.</summary>
    public MatchingAudit Run()
    {
        MatchPromise[] promises = [.. Design.MatchOn.Select(rule => new MatchPromise(rule, Cells, IsOfInterest))];
        MarkRows();
        MarkPersons();
        List<SetMembers> sets = RoleSets.Of(Dispositions, Sets, _roles, Groups);
        SetShape[] shapes = RoleSets.Shapes(sets);
        Settle(sets);
        List<SetMembers> complete = Leave(sets, set => set.Complete, Disposition.NoPartner);
        RequireSome(complete, "no set has a sample in both roles");
        int unmatched = CountUnmatched(complete);
        ToleranceBreach[] breaches = [.. complete.Select(PeopleOf).SelectMany(set => promises.SelectMany(promise => promise.BreachesOf(set)))];
        int outside = breaches.Select(breach => breach.Set).Distinct().Count();
        if (Study.Gates.Tolerance == Tolerance.Drop)
            complete = WithinTolerance(complete, promises);
        if (Strata is not null)
            complete = Leave(complete, set => StratumCells.Of(set.Rows, Strata) is not null, Disposition.StratumUnclear);
        RequireSome(complete, "every complete set is outside the tolerance or has an unclear stratum");
        Arrangement arrangement = Arrange(complete);
        SetPeople[] people = [.. complete.Select(PeopleOf)];
        WarnOfSets(promises, people, outside);
        WarnOfReuse(arrangement);
        int ofInterest = Enumerable.Range(0, Cells.Rows).Count(IsOfInterest);
        return new MatchingAudit
        {
            Dispositions = Dispositions,
            AuditTable = [.. Dispositions.Select((disposition, row) => new AuditedRow(row + 1, Names[row], Sets[row], _roleCells[row], disposition))],
            Counts = [.. Enum.GetValues<Disposition>().Select(kind => new DispositionCount(kind, Count(kind)))],
            Arrangement = arrangement,
            Shapes = shapes,
            Balance = [.. promises.Select(promise => promise.BalanceOf(people))],
            Breaches = breaches,
            BrokenGates = [.. AuditGates.Broken(Study.Gates, unmatched, ofInterest, outside)],
            Warnings = [.. _warnings],
            RowsOfInterest = ofInterest,
            RowsUnmatched = unmatched,
        };
    }

    /// <summary>Marks rows of people whose use in several sets is not allowed.</summary>
    /// <returns>Rows that could not be checked because their person is missing.</returns>
    protected abstract int MarkPersonsInTwoSets();

    /// <summary>Deals with several samples in one place of a set as the study file says, marking the rows that leave.</summary>
    protected abstract void Settle(List<SetMembers> sets);

    /// <summary>The people of a settled set.</summary>
    protected abstract SetPeople PeopleOf(SetMembers set);

    /// <summary>The sets that stay, where those outside the tolerance are dropped; rows that leave are marked.</summary>
    protected abstract List<SetMembers> WithinTolerance(List<SetMembers> sets, MatchPromise[] promises);

    /// <summary>Arranges the sets for the run.</summary>
    protected abstract Arrangement Arrange(IReadOnlyList<SetMembers> sets);

    /// <summary>True for a row in the index role.</summary>
    protected bool IsIndex(int row) => _roles[row] == Groups.Index;

    /// <summary>The sets that stay; the rows of the others are marked.</summary>
    protected List<SetMembers> Leave(List<SetMembers> sets, Func<SetMembers, bool> stays, Disposition reason)
    {
        foreach (int row in sets.Where(set => !stays(set)).SelectMany(set => set.Rows))
            Dispositions[row] = reason;
        return [.. sets.Where(stays)];
    }

    private bool IsOfInterest(int row) => IsIndex(row) || _roles[row] == Groups.Reference;

    private void MarkRows()
    {
        for (int row = 0; row < Dispositions.Length; row++)
        {
            Dispositions[row] = Sets[row] is null ? Disposition.SetMissing
                : _roles[row] is null ? Disposition.RoleMissing
                : !IsOfInterest(row) ? Disposition.RoleOfNoInterest
                : !Names.Measured(row) ? Disposition.NotInValues
                : Disposition.Used;
        }

        Warn("not-in-values", Count(Disposition.NotInValues), "sample of interest has no measurements", "samples of interest have no measurements");
    }

    private void MarkPersons()
    {
        if (Persons is null)
            return;
        int unknown = MarkPersonsInTwoSets();
        Warn("person-in-two-sets", Count(Disposition.PersonInTwoSets), "sample is of a person who already stands in another set; it is left out", "samples are of people who already stand in another set; they are left out");
        Warn("person-missing", unknown, $"sample has no person in the column '{Design.Subject ?? Study.Data.Sample}' and was not checked for use in two sets", $"samples have no person in the column '{Design.Subject ?? Study.Data.Sample}' and were not checked for use in two sets");
    }

    // A replicate that was left out has found its set when the set is complete.
    private int CountUnmatched(List<SetMembers> complete)
    {
        HashSet<string> names = [.. complete.Select(set => set.Set)];
        return Enumerable.Range(0, Cells.Rows).Count(row => IsOfInterest(row) && Dispositions[row] switch
        {
            Disposition.Used => false,
            Disposition.DuplicatePlace => !names.Contains(Sets[row]!),
            _ => true,
        });
    }

    private void WarnOfSets(MatchPromise[] promises, SetPeople[] sets, int outside)
    {
        if (Study.Gates.Tolerance == Tolerance.Report)
            Warn("outside-tolerance", outside, "set is outside match-on and is used", "sets are outside match-on and are used");
        Warn("match-unknown", sets.Count(set => promises.Any(promise => !promise.IsKnown(set))), "used set lacks a value that match-on would check", "used sets lack a value that match-on would check");
        Warn("stratum-unclear", Count(Disposition.StratumUnclear), "sample stands in a set whose stratum is missing or contradictory; it is left out", "samples stand in sets whose stratum is missing or contradictory; they are left out");
    }

    private void WarnOfReuse(Arrangement arrangement) => Warn(
        "reused-controls", arrangement.PeopleInSeveralSets,
        "person serves in several used sets, as design.reuse allows; these sets are not independent, which no method takes into account",
        "people serve in several used sets, as design.reuse allows; these sets are not independent, which no method takes into account");

    private void Warn(string code, int count, string one, string several)
    {
        if (count > 0)
            _warnings.Add(new AuditWarning(code, $"{count} {(count == 1 ? one : several)}."));
    }

    private int Count(Disposition kind) => Dispositions.Count(disposition => disposition == kind);

    private void RequireSome(List<SetMembers> sets, string reason)
    {
        if (sets.Count > 0)
            return;
        string flow = string.Join(", ", Enum.GetValues<Disposition>().Where(kind => Count(kind) > 0).Select(kind => $"{Count(kind)} {WrittenName.Of(kind)}"));
        throw new RefusalException(
            Cells.File,
            $"{reason} (rows: {flow})",
            $"at least one value of '{Design.Set}' with one sample '{Groups.Index}' and one '{Groups.Reference}' in '{Groups.Column}'",
            "Check design.set and design.role.");
    }
}
