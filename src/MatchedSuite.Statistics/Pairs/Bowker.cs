namespace MatchedSuite.Statistics.Pairs;

/// <summary>Bowker's test of symmetry: do pairs move from one category to another as often as back?</summary>
/// <remarks>
/// <para>Statistic: Σ (n(i,j) − n(j,i))²/(n(i,j) + n(j,i)) over i &lt; j, chi-squared; one degree of freedom for each two categories between
/// which any pair moves. For two categories it is <see cref="McNemar"/>. The order of categories does not matter, and the
/// test has no direction: a one-sided request is answered two-sided and remarked. No estimate.</para>
/// <para>Assumes independent pairs and enough moves for the approximation. Source: Bowker (1948), Journal of the American Statistical
/// Association 43, 572-574. Worked through in docs/methods/stuart-maxwell.md.</para>
/// </remarks>
public static class Bowker
{
    /// <summary>Tests one endpoint of category codes.</summary>
    /// <param name="pairs">The complete pairs; at least one must differ.</param>
    /// <param name="options">Confidence is not used; sides other than two are remarked.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> where no pair differs,
    /// <see cref="Outcome.TooManyCategories"/> with more than 100 distinct codes.
    /// </returns>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        int n = pairs.Count;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);
        using var frame = scratch.Open();
        var table = SquareTable.Of(pairs, frame);
        if (table.IsTooLarge)
            return TestResult.Untested(Outcome.TooManyCategories, n, 2 * n);
        double statistic = 0;
        int df = 0;
        for (int i = 0; i < table.Categories; i++)
        {
            for (int j = i + 1; j < table.Categories; j++)
            {
                double there = table[i, j], back = table[j, i];
                if (there + back == 0)
                    continue;
                statistic += (there - back) * (there - back) / (there + back);
                df++;
            }
        }

        return SquareTable.ResultOf(statistic, df, n, options);
    }
}
