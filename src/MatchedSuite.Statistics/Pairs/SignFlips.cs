namespace MatchedSuite.Statistics.Pairs;

/// <summary>What n differences with random signs can give at all.</summary>
internal static class SignFlips
{
    /// <summary>p-value of the one arrangement in which all n point the way of the alternative: 2⁻ⁿ, doubled when two-sided.</summary>
    /// <param name="n">Number of differences that have a sign, at least 1.</param>
    /// <param name="sides">Direction of the alternative.</param>
    public static Probability SmallestP(int n, Sides sides)
    {
        int halvings = sides == Sides.Two ? n - 1 : n;
        return new Probability(Math.ScaleB(1, -halvings), -halvings * Math.Log10(2));
    }
}
