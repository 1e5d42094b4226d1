namespace MatchedSuite.Study.Matching;

/// <summary>The rows of one subject in each place, in sheet order.</summary>
/// <param name="Subject">Name of the subject.</param>
/// <param name="Places">One list of rows a place; empty where the subject lacks it.</param>
internal sealed record SubjectPlaces(string Subject, List<int>[] Places)
{
    /// <summary>All rows.</summary>
    public IEnumerable<int> Rows => Places.SelectMany(rows => rows);

    /// <summary>True where the subject has a sample in the place.</summary>
    public bool Has(int place) => Places[place].Count > 0;

    /// <summary>The subjects with at least one row still <see cref="Disposition.Used"/>, in order of first appearance.</summary>
    /// <param name="dispositions">What became of each row so far.</param>
    /// <param name="subjects">Name of each row's subject.</param>
    /// <param name="places">Position of each row's place; −1 where it is of no interest.</param>
    /// <param name="count">Number of places.</param>
    public static List<SubjectPlaces> Of(Disposition[] dispositions, string?[] subjects, int[] places, int count)
    {
        var byName = new Dictionary<string, SubjectPlaces>(StringComparer.Ordinal);
        var inOrder = new List<SubjectPlaces>();
        for (int row = 0; row < dispositions.Length; row++)
        {
            if (dispositions[row] != Disposition.Used)
                continue;
            string name = subjects[row]!;
            if (!byName.TryGetValue(name, out SubjectPlaces? subject))
                inOrder.Add(byName[name] = subject = new SubjectPlaces(name, [.. Enumerable.Range(0, count).Select(_ => new List<int>())]));
            subject.Places[places[row]].Add(row);
        }

        return inOrder;
    }
}
