namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Simes p-values of the k largest p-values of a family, for every k.</summary>
/// <remarks>
/// S(k) = min over j of k·p(m − k + j)/j is the least slope from the point (m − k, 0) to the points (i, p(i)), i &gt; m − k.
/// As that point moves left, the touching point never moves right, so all of them are found by divide and conquer in
/// O(m log m) comparisons (Meijer, Krebs and Goeman 2019).
/// </remarks>
internal static class LargestSimes
{
    /// <summary>Entry k − 1 is S(k); the entries fall as k grows.</summary>
    /// <param name="ascending">The family's p-values in ascending order, none missing.</param>
    public static Probability[] Of(ReadOnlySpan<Probability> ascending)
    {
        int m = ascending.Length;
        var simes = new Probability[m];
        if (m > 0)
            Fill(ascending, simes, 1, m, 1, m);
        for (int k = 1; k < m; k++)
            simes[k] = Probability.Min(simes[k - 1], simes[k]);
        return simes;
    }

    // Sets of smallest..largest hypotheses, whose touching points lie in lowest..highest (counted from 1).
    private static void Fill(ReadOnlySpan<Probability> ascending, Span<Probability> simes, int smallest, int largest, int lowest, int highest)
    {
        if (smallest > largest)
            return;
        int k = smallest + ((largest - smallest) >> 1);
        int left = ascending.Length - k;
        int touching = Math.Max(left + 1, lowest);
        for (int point = touching + 1; point <= highest; point++)
        {
            if (IsFlatter(ascending[point - 1], point - left, ascending[touching - 1], touching - left))
                touching = point;
        }

        simes[k - 1] = ascending[touching - 1].Times((double)k / (touching - left));
        Fill(ascending, simes, smallest, k - 1, touching, highest);
        Fill(ascending, simes, k + 1, largest, lowest, touching);
    }

    // Is p over run at most the slope of other over otherRun? Cross-multiplied, so equal slopes meet where doubles allow.
    private static bool IsFlatter(Probability p, int run, Probability other, int otherRun) =>
        Math.Min(p.Value, other.Value) >= Probability.SmallestWithAllDigits
            ? p.Value * otherRun <= other.Value * run
            : p.Log10 - Math.Log10(run) <= other.Log10 - Math.Log10(otherRun);
}
