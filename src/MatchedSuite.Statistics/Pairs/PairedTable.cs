namespace MatchedSuite.Statistics.Pairs;

/// <summary>The 2 × 2 table of a yes/no endpoint on pairs; the literature's a, b, c, d.</summary>
/// <param name="Both">a: pairs with 1 in both roles.</param>
/// <param name="IndexOnly">b: pairs with 1 in the index role alone.</param>
/// <param name="ReferenceOnly">c: pairs with 1 in the reference role alone.</param>
/// <param name="Neither">d: pairs with 0 in both roles.</param>
public readonly record struct PairedTable(int Both, int IndexOnly, int ReferenceOnly, int Neither)
{
    /// <summary>Number of pairs.</summary>
    public int Pairs => Both + IndexOnly + ReferenceOnly + Neither;

    /// <summary>b + c: pairs whose two values differ.</summary>
    public int Discordant => IndexOnly + ReferenceOnly;

    /// <summary>Counts the pairs of an endpoint whose values are 0 and 1.</summary>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1.</exception>
    public static PairedTable Of(in PairSample pairs)
    {
        Span<int> counts = stackalloc int[4];
        counts.Clear();
        for (int i = 0; i < pairs.Count; i++)
            counts[(2 * Bit(pairs.Index[i])) + Bit(pairs.Reference[i])]++;
        return new PairedTable(counts[3], counts[2], counts[1], counts[0]);
    }

    private static int Bit(double value) => value switch
    {
        0 => 0,
        1 => 1,
        _ => throw new ArgumentException($"A yes/no endpoint has the value {value}; expected 0 or 1 in every pair."),
    };
}
