using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits a design in which every subject passes through ordered places, check by check; a row keeps the first disposition it is given.</summary>
internal abstract class PlacesAudit
{
    /// <summary>Stands for a row whose place is of no interest.</summary>
    private const int NoPlace = -1;

    private readonly string _placeKey;
    private readonly string?[] _placeCells;
    private readonly string?[]? _strata;
    private readonly int[] _places;
    private readonly SampleNames _names;
    private readonly List<AuditWarning> _warnings = [];

    /// <summary>Takes the columns that the study names.</summary>
    /// <param name="study">The study.</param>
    /// <param name="sheet">Its sample sheet.</param>
    /// <param name="measured">Sample names of the file of measurements; null when the sheet holds them.</param>
    /// <param name="order">The places.</param>
    /// <param name="placeKey">Key of the study file that names them.</param>
    protected PlacesAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured, OrderedGroups order, string placeKey)
    {
        DesignSection design = study.Design;
        Study = study;
        Order = order;
        Cells = new SheetCells(sheet, study.Data.Dialect);
        Subjects = Cells.Column(design.Subject!, "design.subject");
        _placeKey = placeKey;
        _placeCells = Cells.Column(order.Column, $"{placeKey}.column");
        foreach (string place in order.Order)
            RoleCells.RequireSeen(Cells, order.Column, _placeCells, place, $"{placeKey}.order");
        _strata = design.Stratum is { } stratum ? Cells.Column(stratum, "design.stratum") : null;
        foreach (string covariate in design.Covariates)
            Cells.Column(covariate, "design.covariates");
        if (design.PersonTime is { } time)
            Cells.Column(time, "design.person-time");
        var positions = order.Order.Select((name, place) => (name, place)).ToDictionary(of => of.name, of => of.place, StringComparer.Ordinal);
        _places = [.. _placeCells.Select(cell => cell is not null && positions.TryGetValue(cell, out int place) ? place : NoPlace)];
        _names = SampleNames.Of(Cells, study.Data, measured);
        Dispositions = new Disposition[Cells.Rows];
    }

    /// <summary>The study.</summary>
    protected StudyDefinition Study { get; }

    /// <summary>The sheet.</summary>
    protected SheetCells Cells { get; }

    /// <summary>The places.</summary>
    protected OrderedGroups Order { get; }

    /// <summary>Name of each row's subject; null where missing.</summary>
    protected string?[] Subjects { get; }

    /// <summary>What became of each row so far.</summary>
    protected Disposition[] Dispositions { get; }

    /// <summary>Names of the groups of subjects that are compared; one without a name where subjects are not grouped.</summary>
    protected virtual IReadOnlyList<string> Groups => [""];

    /// <summary>What a complete subject has, for a message.</summary>
    protected abstract string Completeness { get; }

    /// <summary>Runs the checks in their order.</summary>
    public MatchingAudit Run()
    {
        MarkRows();
        VisitDays? days = Order.Window is { } window ? new VisitDays(window, Order.Order, Cells, row => Dispositions[row] == Disposition.Used) : null;
        MarkDays(days);
        List<SubjectPlaces> subjects = Leave(SubjectPlaces.Of(Dispositions, Subjects, _places, Order.Order.Count), IsClear, Disposition.SequenceUnclear);
        var patterns = PlacePatterns.Of(Order.Order, Groups, subjects, GroupOf);
        Settle(subjects);
        subjects = Leave(subjects, IsComplete, Disposition.NoPartner);
        RequireSome(subjects, $"no subject has {Completeness}");
        int unmatched = CountUnmatched(subjects);
        if (_strata is not null)
            subjects = Leave(subjects, subject => StratumCells.Of(subject.Rows, _strata) is not null, Disposition.StratumUnclear);
        RequireSome(subjects, "every complete subject has an unclear stratum");
        RequireGroups(subjects);
        OrderBreach[] outOfOrder = days is null ? [] : [.. days.Breaches(subjects)];
        WarnOfSubjects(outOfOrder);
        int ofInterest = Enumerable.Range(0, Cells.Rows).Count(IsOfInterest);
        Arrangement arrangement = PlaceArrangement.Of(subjects, Order.Order, _strata, Groups.Count < 2 ? [] : [.. subjects.Select(GroupOf)]);
        return new MatchingAudit
        {
            Dispositions = Dispositions,
            AuditTable = [.. Dispositions.Select((disposition, row) => new AuditedRow(row + 1, _names[row], Subjects[row], _placeCells[row], disposition))],
            Counts = [.. Enum.GetValues<Disposition>().Select(kind => new DispositionCount(kind, Count(kind)))],
            Arrangement = arrangement,
            Shapes = [],
            Balance = [],
            Breaches = [],
            Patterns = patterns,
            OutOfOrder = outOfOrder,
            GroupBalance = Groups.Count < 2 ? [] : GroupsBalance.Of(Study, Cells, subjects, GroupOf, BaselinePlace),
            BrokenGates = [.. AuditGates.Broken(Study.Gates, unmatched, ofInterest, 0)],
            Warnings = [.. _warnings],
            RowsOfInterest = ofInterest,
            RowsUnmatched = unmatched,
        };
    }

    /// <summary>The place whose samples tell how groups compare before treatment.</summary>
    protected virtual int BaselinePlace => 0;

    /// <summary>What is wrong with a row beside its subject and place: its arm or treatment; null for nothing.</summary>
    protected virtual Disposition? ProblemOf(int row) => null;

    /// <summary>True for a subject whose samples do not contradict each other.</summary>
    protected virtual bool IsClear(SubjectPlaces subject) => true;

    /// <summary>True for a subject with all samples that a comparison needs.</summary>
    protected abstract bool IsComplete(SubjectPlaces subject);

    /// <summary>Position of a subject's group in <see cref="Groups"/>.</summary>
    protected virtual int GroupOf(SubjectPlaces subject) => 0;

    private bool IsOfInterest(int row) => _places[row] != NoPlace && ProblemOf(row) is not (Disposition.RoleMissing or Disposition.RoleOfNoInterest);

    private void MarkRows()
    {
        for (int row = 0; row < Dispositions.Length; row++)
        {
            Disposition? problem = Subjects[row] is null ? null : ProblemOf(row);
            Dispositions[row] = Subjects[row] is null ? Disposition.SetMissing
                : _placeCells[row] is null ? Disposition.RoleMissing
                : problem == Disposition.RoleMissing ? Disposition.RoleMissing
                : _places[row] == NoPlace ? Disposition.RoleOfNoInterest
                : problem == Disposition.RoleOfNoInterest ? Disposition.RoleOfNoInterest
                : !_names.Measured(row) ? Disposition.NotInValues
                : problem ?? Disposition.Used;
        }

        Warn("not-in-values", Count(Disposition.NotInValues), "sample of interest has no measurements", "samples of interest have no measurements");
        Warn("in-two-arms", Count(Disposition.InTwoArms), "sample is of a subject whose samples name two arms; it is left out", "samples are of subjects whose samples name two arms; they are left out");
    }

    private void MarkDays(VisitDays? days)
    {
        if (days is null)
            return;
        int unknown = 0;
        for (int row = 0; row < Dispositions.Length; row++)
        {
            if (Dispositions[row] != Disposition.Used)
                continue;
            if (days.IsUnknown(row, _places[row]))
                unknown++;
            else if (days.IsOutside(row, _places[row]))
                Dispositions[row] = Disposition.OutsideWindow;
        }

        Warn("day-missing", unknown, "sample has no day and was not checked against the window of its visit", "samples have no day and were not checked against the window of their visit");
        Warn("outside-window", Count(Disposition.OutsideWindow), "sample was taken outside the window of its visit; it is left out", "samples were taken outside the window of their visit; they are left out");
    }

    private void Settle(List<SubjectPlaces> subjects)
    {
        foreach (SubjectPlaces subject in subjects)
        {
            for (int place = 0; place < subject.Places.Length; place++)
            {
                List<int> rows = subject.Places[place];
                if (rows.Count < 2)
                    continue;
                if (Study.Design.Replicates == Replicates.Refuse)
                {
                    throw new RefusalException(
                        Cells.Places(rows), $"the subject '{subject.Subject}' has {rows.Count} samples of '{Order.Order[place]}' in '{Order.Column}'",
                        "one sample of a subject in each place", "Correct the sheet, or say what to do with design.replicates: mean or first.");
                }

                if (Study.Design.Replicates != Replicates.First)
                    continue;
                foreach (int row in rows.Skip(1))
                    Dispositions[row] = Disposition.DuplicatePlace;
                rows.RemoveRange(1, rows.Count - 1);
            }
        }
    }

    private List<SubjectPlaces> Leave(List<SubjectPlaces> subjects, Func<SubjectPlaces, bool> stays, Disposition reason)
    {
        foreach (int row in subjects.Where(subject => !stays(subject)).SelectMany(subject => subject.Rows))
            Dispositions[row] = reason;
        return [.. subjects.Where(stays)];
    }

    // A replicate or a sample outside its window that was left out has found its subject when the subject is complete.
    private int CountUnmatched(List<SubjectPlaces> subjects)
    {
        HashSet<string> complete = [.. subjects.Select(subject => subject.Subject)];
        return Enumerable.Range(0, Cells.Rows).Count(row => IsOfInterest(row) && Dispositions[row] switch
        {
            Disposition.Used => false,
            Disposition.DuplicatePlace or Disposition.OutsideWindow => !complete.Contains(Subjects[row]!),
            _ => true,
        });
    }

    private void WarnOfSubjects(OrderBreach[] outOfOrder)
    {
        Warn("sequence-unclear", Count(Disposition.SequenceUnclear), "sample is of a subject with one treatment in both periods, or two in one; it is left out", "samples are of subjects with one treatment in both periods, or two in one; they are left out");
        Warn("visits-out-of-order", outOfOrder.Length, "visit is not after the one before it by its day; it is used", "visits are not after the one before them by their days; they are used");
        Warn("stratum-unclear", Count(Disposition.StratumUnclear), "sample stands in a set whose stratum is missing or contradictory; it is left out", "samples stand in sets whose stratum is missing or contradictory; they are left out");
    }

    private void Warn(string code, int count, string one, string several)
    {
        if (count > 0)
            _warnings.Add(new AuditWarning(code, $"{count} {(count == 1 ? one : several)}."));
    }

    private int Count(Disposition kind) => Dispositions.Count(disposition => disposition == kind);

    private void RequireGroups(List<SubjectPlaces> subjects)
    {
        for (int group = 0; group < Groups.Count; group++)
        {
            int wanted = group;
            RequireSome(subjects.FindAll(subject => GroupOf(subject) == wanted), $"no subject of the group '{Groups[group]}' has {Completeness}");
        }
    }

    private void RequireSome(List<SubjectPlaces> subjects, string reason)
    {
        if (subjects.Count > 0)
            return;
        string flow = string.Join(", ", Enum.GetValues<Disposition>().Where(kind => Count(kind) > 0).Select(kind => $"{Count(kind)} {WrittenName.Of(kind)}"));
        throw new RefusalException(
            Cells.File, $"{reason} (rows: {flow})", $"at least one value of '{Study.Design.Subject}' with {Completeness} in '{Order.Column}'",
            $"Check design.subject and {_placeKey}.");
    }
}
