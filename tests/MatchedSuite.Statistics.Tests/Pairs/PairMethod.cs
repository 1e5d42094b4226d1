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
        ["sign"] = OnColumns(SignTest.Run),
    };

    /// <summary>Methods on yes/no values.</summary>
    public static readonly IReadOnlyDictionary<string, PairMethod> Binary = new Dictionary<string, PairMethod>
    {
        ["mcnemar"] = OnColumns(McNemar.Run),
        ["mcnemar-corrected"] = OnColumns(McNemarCorrected.Run),
        ["mcnemar-exact"] = OnColumns(McNemarExact.Run),
        ["mcnemar-midp"] = OnColumns(McNemarMidP.Run),
    };

    private static PairMethod OnColumns(Run run) => (index, reference, options) =>
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return run(PairSample.Of(index, reference, frame), options, scratch);
    };
}
