namespace MatchedSuite.Study.Matching;

/// <summary>The strata of sets: every member's cell must be known and the same.</summary>
internal static class StratumCells
{
    /// <summary>The stratum of a set; null where a member's is missing or they disagree.</summary>
    public static string? Of(IEnumerable<int> rows, string?[] strata)
    {
        string?[] values = [.. rows.Select(row => strata[row]).Distinct()];
        return values.Length == 1 ? values[0] : null;
    }
}
