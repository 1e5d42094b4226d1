namespace MatchedSuite.Storage.Values;

/// <summary>Which columns of a table with one row an endpoint are samples: all but the endpoint's and those set aside.</summary>
internal static class SampleColumns
{
    /// <summary>The columns, in file order.</summary>
    /// <exception cref="RefusalException">There is none, or one has no name.</exception>
    public static int[] Of(string where, IReadOnlyList<string> names, int endpointColumn, IReadOnlySet<string> others)
    {
        var columns = new List<int>(names.Count);
        for (int column = 0; column < names.Count; column++)
        {
            if (column == endpointColumn || others.Contains(names[column])) continue;
            if (names[column].Length == 0)
                throw new RefusalException(where, $"column {column + 1} has no name", "a sample name in each column of the header",
                    "Name the column, or remove it; a delimiter at the end of each line makes one without a name.");
            columns.Add(column);
        }
        if (columns.Count > 0) return [.. columns];
        throw new RefusalException(where, $"there is no sample column beside '{names[endpointColumn]}'", "one column for each sample",
            "Check the delimiter and the layout: in 'endpoint-rows' the header names the samples.");
    }
}
