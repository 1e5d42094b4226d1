using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Puts the rows of a two-role design together into sets.</summary>
internal static class PairSets
{
    /// <summary>The sets with at least one row still <see cref="Disposition.Used"/>, in order of first appearance.</summary>
    public static List<PairMembers> Of(Disposition[] dispositions, string?[] sets, string?[] roles, TwoGroups groups)
    {
        var byName = new Dictionary<string, PairMembers>();
        var inOrder = new List<PairMembers>();
        for (int row = 0; row < dispositions.Length; row++)
        {
            if (dispositions[row] != Disposition.Used)
                continue;
            string name = sets[row]!;
            if (!byName.TryGetValue(name, out var members))
                inOrder.Add(byName[name] = members = new PairMembers(name));
            (roles[row] == groups.Index ? members.Index : members.Reference).Add(row);
        }

        return inOrder;
    }

    /// <summary>How many sets have which numbers of samples, small shapes first.</summary>
    public static SetShape[] Shapes(IEnumerable<PairMembers> sets) =>
        [.. sets.GroupBy(set => (set.Index.Count, set.Reference.Count)).OrderBy(shape => shape.Key)
            .Select(shape => new SetShape(shape.Key.Item1, shape.Key.Item2, shape.Count()))];

    /// <summary>Deals with several samples in one place of a set as the study file says.</summary>
    /// <param name="sets">The sets; with <see cref="Replicates.First"/> they keep one row a place.</param>
    /// <param name="dispositions">With <see cref="Replicates.First"/> the later rows are marked.</param>
    /// <param name="study">The study.</param>
    /// <param name="persons">Name of each row's person; null where the study names no such column.</param>
    /// <param name="cells">The sheet, for messages.</param>
    /// <exception cref="RefusalException">The study refuses replicates, or samples of different people stand in one place.</exception>
    public static void Settle(List<PairMembers> sets, Disposition[] dispositions, DesignSection study, string?[]? persons, SheetCells cells)
    {
        foreach (PairMembers set in sets)
        {
            foreach (List<int> rows in (List<int>[])[set.Index, set.Reference])
            {
                if (rows.Count < 2)
                    continue;
                RefuseReplicates(set, rows, study, persons, cells);
                if (study.Replicates != Replicates.First)
                    continue;
                foreach (int row in rows.Skip(1))
                    dispositions[row] = Disposition.DuplicatePlace;
                rows.RemoveRange(1, rows.Count - 1);
            }
        }
    }

    private static void RefuseReplicates(PairMembers set, List<int> rows, DesignSection study, string?[]? persons, SheetCells cells)
    {
        string role = rows == set.Index ? study.Role!.Index : study.Role!.Reference;
        string[] people = persons is null ? [] : [.. rows.Select(row => persons[row]).OfType<string>().Distinct()];
        if (people.Length > 1)
        {
            throw new RefusalException(
                cells.Places(rows),
                $"the set '{set.Set}' has {people.Length} people in the role '{role}': {Listing.Of(people)}",
                "one person in each role of a pair",
                "Correct the sheet, or state design.kind: sets for sets of more than two people.");
        }

        if (study.Replicates == Replicates.Refuse)
        {
            throw new RefusalException(
                cells.Places(rows),
                $"the set '{set.Set}' has {set.Rows.Count()} members, {rows.Count} of them in the role '{role}'",
                "one sample in each role of a pair",
                "Correct the sheet, or say what to do with design.replicates: mean or first.");
        }
    }
}
