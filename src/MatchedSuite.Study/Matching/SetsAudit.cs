using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits matched sets: any numbers of people in both roles, compared person by person.</summary>
/// <remarks>
/// Without a column that names people every sample is a person of its own; where reuse is allowed, samples of the same name
/// are one person.
/// </remarks>
internal sealed class SetsAudit : RolesAudit
{
    /// <summary>Takes the columns that the study names.</summary>
    public SetsAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured)
        : base(study, sheet, measured)
    {
        if (Persons is null && study.Design.ReuseAllowed && study.Data.Sample is { } sample)
            Persons = Cells.Column(sample, "data.sample");
    }

    /// <inheritdoc/>
    protected override int MarkPersonsInTwoSets() =>
        Study.Design.ReuseAllowed ? PersonCheck.MarkAmong(IsIndex, Dispositions, Sets, Persons!) : PersonCheck.Mark(Dispositions, Sets, Persons!);

    /// <inheritdoc/>
    protected override void Settle(List<SetMembers> sets)
    {
        if (Persons is null)
            return;
        foreach (SetMembers set in sets)
        {
            RefuseBothRoles(set);
            SettleRole(set, set.Index);
            SettleRole(set, set.Reference);
        }
    }

    /// <inheritdoc/>
    protected override SetPeople PeopleOf(SetMembers set) => new(set.Set, People(set.Index), People(set.Reference));

    /// <summary>Leaves out the reference people who break a promise with an index person of their set, then sets without a reference.</summary>
    protected override List<SetMembers> WithinTolerance(List<SetMembers> sets, MatchPromise[] promises)
    {
        foreach (SetMembers set in sets)
        {
            SetPeople people = PeopleOf(set);
            foreach (IReadOnlyList<int> reference in people.Reference)
            {
                if (!promises.Any(promise => people.Index.Any(index => promise.BreachOf(set.Set, index, reference) is not null)))
                    continue;
                foreach (int row in reference)
                {
                    Dispositions[row] = Disposition.OutsideTolerance;
                    set.Reference.Remove(row);
                }
            }
        }

        return Leave(sets, set => set.Complete, Disposition.OutsideTolerance);
    }

    /// <inheritdoc/>
    protected override Arrangement Arrange(IReadOnlyList<SetMembers> sets)
    {
        Arrangement arrangement = SetArrangement.Of([.. sets.Select(PeopleOf)], row => Names.FirstRowOf(row));
        var (names, ofSet) = RoleSets.Strata(sets, Strata);
        return arrangement with { Strata = names, StratumOfSet = ofSet, PeopleInSeveralSets = PeopleInSeveral(sets) };
    }

    private int PeopleInSeveral(IReadOnlyList<SetMembers> sets) => Persons is null
        ? 0
        : sets.SelectMany(set => set.Rows.Select(row => Persons[row]).OfType<string>().Distinct()).GroupBy(person => person).Count(person => person.Count() > 1);

    private IReadOnlyList<int>[] People(List<int> rows) =>
        Persons is null
            ? [.. rows.Select(row => (int[])[row])]
            : [.. rows.GroupBy(row => Persons[row] ?? $"\0{row}").Select(person => person.ToArray())];

    private void SettleRole(SetMembers set, List<int> rows)
    {
        foreach (IReadOnlyList<int> person in People(rows))
        {
            if (person.Count < 2)
                continue;
            if (Study.Design.Replicates == Replicates.Refuse)
            {
                throw new RefusalException(
                    Cells.Places(person),
                    $"the set '{set.Set}' has {person.Count} samples of '{Persons![person[0]]}'",
                    "one sample of each person in a set",
                    "Correct the sheet, or say what to do with design.replicates: mean or first.");
            }

            if (Study.Design.Replicates != Replicates.First)
                continue;
            foreach (int row in person.Skip(1))
            {
                Dispositions[row] = Disposition.DuplicatePlace;
                rows.Remove(row);
            }
        }
    }

    private void RefuseBothRoles(SetMembers set)
    {
        foreach (int row in set.Index)
        {
            int other = Persons![row] is { } person ? set.Reference.FindIndex(reference => Persons[reference] == person) : -1;
            if (other < 0)
                continue;
            throw new RefusalException(
                Cells.Places([row, set.Reference[other]]),
                $"'{Persons[row]}' has both roles of the set '{set.Set}'",
                "people in one role of a set",
                "Correct the sheet; for samples of one person at different times leave design.subject out, or state design.kind: visits.");
        }
    }
}
