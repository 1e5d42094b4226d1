using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>The k × k table of an ordinal endpoint on pairs: index category by reference category.</summary>
internal readonly ref struct SquareTable
{
    /// <summary>Most categories; beyond this an endpoint is no longer ordinal but measured.</summary>
    public const int MostCategories = 100;

    private readonly ReadOnlySpan<int> _counts;

    private SquareTable(int categories, ReadOnlySpan<int> counts)
    {
        Categories = categories;
        _counts = counts;
    }

    /// <summary>True where there are too many codes for a table; then nothing was counted.</summary>
    public bool IsTooLarge => Categories > MostCategories;

    /// <summary>k: number of distinct codes that occur in either role.</summary>
    public int Categories { get; }

    /// <summary>Pairs with this category in the index role and that one in the reference role; categories in ascending order of their codes.</summary>
    public int this[int index, int reference] => _counts[(index * Categories) + reference];

    /// <summary>The result of a chi-squared statistic on such a table, which has no direction; without degrees of freedom nothing differs.</summary>
    public static TestResult ResultOf(double statistic, int degreesOfFreedom, int pairs, TestOptions options) => degreesOfFreedom == 0
        ? TestResult.Untested(Outcome.NothingDiffers, pairs, 2 * pairs)
        : new TestResult
        {
            Sets = pairs,
            Samples = 2 * pairs,
            Statistic = statistic,
            DegreesOfFreedom = degreesOfFreedom,
            P = ChiSquared.UpperTail(statistic, degreesOfFreedom),
            Remarks = options.Sides == Sides.Two ? Remarks.None : Remarks.TwoSidedOnly,
        };

    /// <summary>Counts the pairs of an endpoint.</summary>
    /// <param name="pairs">At least one pair.</param>
    /// <param name="frame">Working memory that outlives the table.</param>
    public static SquareTable Of(in PairSample pairs, in Scratch.Frame frame)
    {
        Span<double> codes = frame.Doubles(2 * pairs.Count);
        pairs.Index.CopyTo(codes);
        pairs.Reference.CopyTo(codes[pairs.Count..]);
        codes.Sort();
        int categories = 1;
        for (int i = 1; i < codes.Length; i++)
        {
            if (codes[i] != codes[categories - 1])
                codes[categories++] = codes[i];
        }

        if (categories > MostCategories)
            return new SquareTable(categories, []);
        Span<int> counts = frame.Integers(categories * categories);
        counts.Clear();
        ReadOnlySpan<double> distinct = codes[..categories];
        for (int i = 0; i < pairs.Count; i++)
            counts[(distinct.BinarySearch(pairs.Index[i]) * categories) + distinct.BinarySearch(pairs.Reference[i])]++;
        return new SquareTable(categories, counts);
    }
}
