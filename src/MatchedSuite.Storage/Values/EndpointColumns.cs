namespace MatchedSuite.Storage.Values;

/// <summary>Which columns of a table with one row a sample are endpoints: all but the sample's and those set aside.</summary>
internal static class EndpointColumns
{
    /// <summary>The columns, in file order.</summary>
    /// <exception cref="RefusalException">There is none, or one has no name.</exception>
    public static int[] Of(string where, IReadOnlyList<string> names, string? sampleColumn, IReadOnlySet<string> others)
    {
        var columns = new List<int>(names.Count);
        for (int column = 0; column < names.Count; column++)
        {
            if (names[column] == sampleColumn || others.Contains(names[column])) continue;
            if (names[column].Length == 0)
                throw new RefusalException(where, $"column {column + 1} has no name", "an endpoint name in each column of the header",
                    "Name the column, or remove it; a delimiter at the end of each line makes one without a name.");
            columns.Add(column);
        }
        if (columns.Count > 0) return [.. columns];
        throw new RefusalException(where, $"there is no endpoint column among {ColumnNames.Listed(names)}", "one column for each endpoint",
            "Check the delimiter and the layout: in 'sample-rows' the header names the endpoints.");
    }
}
