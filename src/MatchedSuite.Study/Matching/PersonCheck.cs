namespace MatchedSuite.Study.Matching;

/// <summary>Finds people who stand in two sets: independent sets are what every method assumes.</summary>
internal static class PersonCheck
{
    /// <summary>Marks the rows of a person outside the first set, in sheet order, in which the person stands.</summary>
    /// <param name="dispositions">One a row; rows still <see cref="Disposition.Used"/> are looked at and may be marked.</param>
    /// <param name="sets">Name of each row's set.</param>
    /// <param name="persons">Name of each row's person; null where missing.</param>
    /// <returns>Number of rows looked at whose person is missing, and which therefore could not be checked.</returns>
    public static int Mark(Disposition[] dispositions, string?[] sets, string?[] persons) => MarkAmong(_ => true, dispositions, sets, persons);

    /// <summary>The same among some of the rows: the others may stand in any number of sets.</summary>
    /// <param name="looksAt">True for a row to look at.</param>
    /// <param name="dispositions">One a row.</param>
    /// <param name="sets">Name of each row's set.</param>
    /// <param name="persons">Name of each row's person; null where missing.</param>
    /// <returns>Number of rows, looked at or not, whose person is missing.</returns>
    public static int MarkAmong(Func<int, bool> looksAt, Disposition[] dispositions, string?[] sets, string?[] persons)
    {
        var firstSet = new Dictionary<string, string>();
        int unknown = 0;
        for (int row = 0; row < dispositions.Length; row++)
        {
            if (dispositions[row] != Disposition.Used)
                continue;
            if (persons[row] is not { } person)
                unknown++;
            else if (looksAt(row) && !firstSet.TryAdd(person, sets[row]!) && firstSet[person] != sets[row])
                dispositions[row] = Disposition.PersonInTwoSets;
        }

        return unknown;
    }
}
