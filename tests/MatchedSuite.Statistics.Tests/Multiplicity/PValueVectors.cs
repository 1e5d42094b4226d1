using CsCheck;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

/// <summary>Random families of p-values with all that makes adjustments stumble: ties, zeros, ones, tiny and missing ones.</summary>
internal static class PValueVectors
{
    private static readonly Probability[] Corners = [Probability.Zero, Probability.One, Probability.Of(1e-300), Probability.FromLog10(-400)];

    public static readonly Gen<Probability> Single = Gen.Frequency(
        (6, Gen.Double[0, 1].Select(Probability.Of)),
        (4, Gen.Int[1, 20].Select(k => Probability.Of(k / 200.0))),
        (2, Gen.Double[-900, -3].Select(Probability.FromLog10)),
        (1, Gen.Int[0, 3].Select(k => Corners[k])));

    public static readonly Gen<Probability> MaybeMissing = Gen.Frequency((8, Single), (1, Gen.Const(Probability.Missing)));

    public static Gen<Probability[]> UpTo(int length) => MaybeMissing.Array[0, length];

    public static Gen<Probability[]> CompleteUpTo(int length) => Single.Array[1, length];

    /// <summary>Levels that no adjusted p-value meets to the last bit: there, rounding alone would decide.</summary>
    public static Gen<double> Levels(double low, double high) => Gen.Double[low, high].Select(level => level * (1 + 1e-6 / Math.Sqrt(2)));

    public static Probability[] Adjusted(Statistics.Multiplicity.Adjustment procedure, Probability[] p)
    {
        var adjusted = new Probability[p.Length];
        procedure(p, adjusted);
        return adjusted;
    }

    /// <summary>Equal but for the rounding of a few operations.</summary>
    public static bool Close(Probability left, Probability right) =>
        left == right || (left.IsMissing && right.IsMissing)
        || (Math.Abs(left.Log10 - right.Log10) <= 1e-13 * Math.Max(1, Math.Abs(left.Log10)) && Math.Abs(left.Value - right.Value) <= 1e-13 * left.Value + 1e-305);

    /// <summary>At most the other, but for the rounding of a few operations.</summary>
    public static bool AtMost(Probability smaller, Probability larger) => smaller <= larger || Close(smaller, larger);
}
