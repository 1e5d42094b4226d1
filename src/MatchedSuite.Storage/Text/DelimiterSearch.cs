namespace MatchedSuite.Storage.Text;

/// <summary>Finds the delimiter of a header line: the candidate that occurs most often outside quotes.</summary>
internal static class DelimiterSearch
{
    // In the order in which ties are decided; a header of one column has none of them and any will do.
    private static readonly char[] Candidates = [',', ';', '\t', '|'];

    public static char In(ReadOnlySpan<byte> header, char decimalMark)
    {
        int[] counts = new int[Candidates.Length];
        bool quoted = false;
        foreach (byte b in header)
        {
            if (b == '"') quoted = !quoted;
            if (quoted) continue;
            int candidate = Array.IndexOf(Candidates, (char)b);
            if (candidate >= 0 && b != decimalMark) counts[candidate]++;
        }
        int most = Array.IndexOf(counts, counts.Max());
        return counts[most] > 0 || decimalMark != ',' ? Candidates[most] : ';';
    }
}
