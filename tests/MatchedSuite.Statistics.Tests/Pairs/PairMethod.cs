using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

/// <summary>A pair method as the laws see it: two columns in, a result out.</summary>
internal delegate TestResult PairMethod(double[] index, double[] reference, TestOptions options);

/// <summary>The pair methods by name.</summary>
internal static class PairMethods
{
    private delegate TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch);

    /// <summary>Methods on measured values.</summary>
    public static readonly IReadOnlyDictionary<string, PairMethod> Measured = new Dictionary<string, PairMethod>
    {
        ["paired-t"] = OnColumns(PairedT.Run),
        ["signed-rank"] = OnColumns(SignedRank.Run),
        ["signed-rank, pratt"] = OnColumns(SignedRankPratt.Run),
        ["sign"] = OnColumns(SignTest.Run),
        ["sign-flip"] = OnColumns((in PairSample pairs, TestOptions options, Scratch scratch) =>
            SignFlipMean.Run(pairs, options with { Resamples = 499, Seed = 7 }, scratch)),
        ["trimmed-mean"] = OnColumns(TrimmedMean.Run),
        ["moderated-paired-t"] = OnColumns((in PairSample pairs, TestOptions options, Scratch scratch) =>
            ModeratedPairedT.Finish(PairedT.Run(pairs, options, scratch), RelativePrior(pairs, scratch), options)),
        ["paired-t, adjusted"] = OnColumns((in PairSample pairs, TestOptions options, Scratch scratch) =>
            OnIndexed(AdjustedPairedT.Run, pairs, exposure: false, options, scratch)),
        ["within-pair-slope"] = OnColumns((in PairSample pairs, TestOptions options, Scratch scratch) =>
            OnIndexed(WithinPairSlope.Run, pairs, exposure: true, options, scratch)),
    };

    /// <summary>Methods on yes/no values.</summary>
    public static readonly IReadOnlyDictionary<string, PairMethod> Binary = new Dictionary<string, PairMethod>
    {
        ["mcnemar"] = OnColumns(McNemar.Run),
        ["mcnemar-corrected"] = OnColumns(McNemarCorrected.Run),
        ["mcnemar-exact"] = OnColumns(McNemarExact.Run),
        ["mcnemar-midp"] = OnColumns(McNemarMidP.Run),
        ["mcnemar, adjusted"] = OnColumns((in PairSample pairs, TestOptions options, Scratch scratch) =>
            OnIndexed(AdjustedOddsRatio.Run, pairs, exposure: false, options, scratch)),
    };

    /// <summary>Methods on codes of categories; they have no direction.</summary>
    public static readonly IReadOnlyDictionary<string, PairMethod> Categories = new Dictionary<string, PairMethod>
    {
        ["bowker"] = OnColumns(Bowker.Run),
        ["stuart-maxwell"] = OnColumns(StuartMaxwell.Run),
    };

    /// <summary>Methods on counts.</summary>
    public static readonly IReadOnlyDictionary<string, PairMethod> Counts = new Dictionary<string, PairMethod>
    {
        ["paired-poisson"] = OnColumns(PairedPoisson.Run),
    };

    private delegate TestResult Regression(in RegressionPairs sample, TestOptions options, Scratch scratch);

    // A common variance in the unit of the values themselves, so that a change of unit changes it too.
    private static VariancePrior? RelativePrior(in PairSample pairs, Scratch scratch)
    {
        double own = ModeratedPairedT.VarianceOf(PairedT.Run(pairs, TestOptions.Default, scratch));
        return double.IsNaN(own) ? null : new VariancePrior(4.5, 0.6 * own);
    }

    // A column that the place of the pair decides, with either sign.
    private static TestResult OnIndexed(Regression run, in PairSample pairs, bool exposure, TestOptions options, Scratch scratch)
    {
        double[] column = [.. Enumerable.Range(0, pairs.Count).Select(i => Math.Sin(1 + (1.7 * i)))];
        return exposure
            ? run(RegressionPairs.WithExposure(pairs, column, []), options, scratch)
            : run(RegressionPairs.WithCovariates(pairs, column), options, scratch);
    }

    private static PairMethod OnColumns(Run run) => (index, reference, options) =>
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return run(PairSample.Of(index, reference, frame), options, scratch);
    };
}
