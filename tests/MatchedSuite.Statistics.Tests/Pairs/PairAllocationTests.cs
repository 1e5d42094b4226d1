using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class PairAllocationTests
{
    private delegate TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch);

    [Fact]
    public void No_method_allocates_for_an_endpoint()
    {
        var random = new Random(1);
        double[] index = [.. Enumerable.Range(0, 200).Select(_ => random.NextDouble())];
        double[] coarse = [.. index.Take(48).Select(v => Math.Round(v, 1))];
        double[] bits = [.. index.Select(v => v > 0.4 ? 1.0 : 0.0)];
        var scratch = new Scratch();
        foreach (Run run in new Run[] { PairedT.Run, SignedRank.Run, SignedRankPratt.Run, SignTest.Run, TrimmedMean.Run, SignFlipMean.Run, Adjusted, Slope })
        {
            Assert.Equal(0, AllocatedBy(run, index, new double[200], scratch));
            Assert.Equal(0, AllocatedBy(run, coarse, new double[48], scratch));
        }

        double[] codes = [.. index.Select(v => Math.Floor(4 * v))];
        foreach (Run run in new Run[] { Bowker.Run, StuartMaxwell.Run, PairedPoisson.Run })
            Assert.Equal(0, AllocatedBy(run, codes, new double[200], scratch));

        foreach (Run run in new Run[] { McNemar.Run, McNemarCorrected.Run, McNemarExact.Run, McNemarMidP.Run })
            Assert.Equal(0, AllocatedBy(run, bits, new double[200], scratch));
    }

    private static readonly double[] Covariates = [.. Enumerable.Range(0, 400).Select(i => Math.Sin(1 + (1.7 * i)))];

    private static TestResult Adjusted(in PairSample pairs, TestOptions options, Scratch scratch) =>
        AdjustedPairedT.Run(RegressionPairs.WithCovariates(pairs, Covariates.AsSpan(0, 2 * pairs.Count)), options, scratch);

    private static TestResult Slope(in PairSample pairs, TestOptions options, Scratch scratch) => WithinPairSlope.Run(
        RegressionPairs.WithExposure(pairs, Covariates.AsSpan(0, pairs.Count), Covariates.AsSpan(1, pairs.Count)), options, scratch);

    private static long AllocatedBy(Run run, double[] index, double[] reference, Scratch scratch) =>
        Allocated.Least(() => Once(run, index, reference, scratch));

    private static void Once(Run run, double[] index, double[] reference, Scratch scratch)
    {
        using var frame = scratch.Open();
        // The assertion library allocates, so it stays outside.
        if (run(PairSample.Of(index, reference, frame), TestOptions.Default, scratch).Outcome != Outcome.Tested)
            throw new InvalidOperationException("The endpoint should have been tested.");
    }
}
