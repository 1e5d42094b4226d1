using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Engine.Methods;

/// <summary>What the first step of a procedure asks of a p-value: <see cref="FirstStepThreshold"/>.</summary>
/// <remarks>A design whose smallest possible p-value lies above it cannot find the endpoint unless other endpoints fall first.</remarks>
internal static class FirstStep
{
    /// <summary>level/m.</summary>
    public static void EqualShares(in Hypotheses hypotheses, double level, Span<double> thresholds) =>
        thresholds.Fill(level / hypotheses.P.Length);

    /// <summary>1 − (1 − level)^(1/m).</summary>
    public static void SidakShares(in Hypotheses hypotheses, double level, Span<double> thresholds) =>
        thresholds.Fill(1 - Math.Pow(1 - level, 1.0 / hypotheses.P.Length));

    /// <summary>Each its weight's share of the level.</summary>
    public static void WeightedShares(in Hypotheses hypotheses, double level, Span<double> thresholds)
    {
        double sum = 0;
        foreach (double weight in hypotheses.Weights)
            sum += weight;
        for (int i = 0; i < thresholds.Length; i++)
            thresholds[i] = sum > 0 ? level * hypotheses.Weights[i] / sum : 0;
    }

    /// <summary>The whole level, once it is a hypothesis' turn.</summary>
    public static void WholeLevel(in Hypotheses hypotheses, double level, Span<double> thresholds) => thresholds.Fill(level);

    /// <summary>level/m of the hypothesis' own family, once its gate is open.</summary>
    public static void SharesOfFamily(in Hypotheses hypotheses, double level, Span<double> thresholds)
    {
        Families families = hypotheses.Families;
        for (int family = 0; family < families.Count; family++)
        {
            foreach (int at in families.Members(family))
                thresholds[at] = level / families.Members(family).Length;
        }
    }
}
