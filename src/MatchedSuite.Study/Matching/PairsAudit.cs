using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Audits a design of pairs: one person in each role of a set.</summary>
internal sealed class PairsAudit(StudyDefinition study, TextTable sheet, IReadOnlyList<string>? measured) : RolesAudit(study, sheet, measured)
{
    /// <inheritdoc/>
    protected override int MarkPersonsInTwoSets() => PersonCheck.Mark(Dispositions, Sets, Persons!);

    /// <inheritdoc/>
    protected override void Settle(List<SetMembers> sets)
    {
        foreach (SetMembers set in sets)
        {
            foreach (List<int> rows in (List<int>[])[set.Index, set.Reference])
            {
                if (rows.Count < 2)
                    continue;
                RefuseReplicates(set, rows);
                if (Study.Design.Replicates != Replicates.First)
                    continue;
                foreach (int row in rows.Skip(1))
                    Dispositions[row] = Disposition.DuplicatePlace;
                rows.RemoveRange(1, rows.Count - 1);
            }
        }
    }

    /// <inheritdoc/>
    protected override SetPeople PeopleOf(SetMembers set) => new(set.Set, [set.Index], [set.Reference]);

    /// <inheritdoc/>
    protected override List<SetMembers> WithinTolerance(List<SetMembers> sets, MatchPromise[] promises) =>
        Leave(sets, set => !promises.Any(promise => promise.BreachesOf(PeopleOf(set)).Any()), Disposition.OutsideTolerance);

    /// <inheritdoc/>
    protected override Arrangement Arrange(IReadOnlyList<SetMembers> sets) => PairArrangement.Of(sets, Groups, Strata);

    private void RefuseReplicates(SetMembers set, List<int> rows)
    {
        string role = rows == set.Index ? Groups.Index : Groups.Reference;
        string[] people = Persons is null ? [] : [.. rows.Select(row => Persons[row]).OfType<string>().Distinct()];
        if (people.Length > 1)
        {
            throw new RefusalException(
                Cells.Places(rows),
                $"the set '{set.Set}' has {people.Length} people in the role '{role}': {Listing.Of(people)}",
                "one person in each role of a pair",
                "Correct the sheet, or state design.kind: sets for sets of more than two people.");
        }

        if (Study.Design.Replicates == Replicates.Refuse)
        {
            throw new RefusalException(
                Cells.Places(rows),
                $"the set '{set.Set}' has {set.Rows.Count()} members, {rows.Count} of them in the role '{role}'",
                "one sample in each role of a pair",
                "Correct the sheet, or say what to do with design.replicates: mean or first.");
        }
    }
}
