using MatchedSuite.Statistics;

namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>analysis</c>: what is computed.</summary>
public sealed record AnalysisSection
{
    /// <summary>Method names by kind of endpoint; the first of a kind is its primary method.</summary>
    public IReadOnlyDictionary<EndpointKind, IReadOnlyList<string>> Methods { get; init; } =
        new Dictionary<EndpointKind, IReadOnlyList<string>>();

    /// <summary>Direction of the alternative: index compared with reference.</summary>
    public Sides Sides { get; init; } = Sides.Two;

    /// <summary>Coverage of the intervals.</summary>
    public double Confidence { get; init; } = 0.95;

    /// <summary>Names of the adjustments, in the order asked for.</summary>
    public IReadOnlyList<string> Adjust { get; init; } = ["holm", "bh"];

    /// <summary>Over which hypotheses an adjustment runs.</summary>
    public FamilyRule Family { get; init; } = FamilyRule.All;

    /// <summary>Level for procedures that control the family-wise error rate.</summary>
    public double Alpha { get; init; } = 0.05;

    /// <summary>Level for procedures that control the false discovery rate.</summary>
    public double Fdr { get; init; } = 0.05;

    /// <summary>Random relabelings where not all can be listed.</summary>
    public int Resamples { get; init; } = 9999;

    /// <summary>Fewer usable sets: the endpoint is listed as untested.</summary>
    public int MinimumSets { get; init; } = 3;

    /// <summary>What the signed-rank test does with differences of zero.</summary>
    public ZeroRule Zeros { get; init; } = ZeroRule.Drop;

    /// <summary>Intervals given beside the marginal ones.</summary>
    public IReadOnlyList<IntervalKind> Intervals { get; init; } = [];

    /// <summary>Those of them whose confidence depends on how many endpoints there are.</summary>
    public IReadOnlyList<IntervalKind> IntervalsOverEndpoints => [.. Intervals.Where(kind => kind is IntervalKind.Fcr or IntervalKind.Simultaneous)];

    /// <summary>True where the hypotheses of all contrasts are adjusted together.</summary>
    public bool AcrossContrasts { get; init; }

    /// <summary>How far each finding can be trusted: what is computed about it.</summary>
    public SensitivitySection Sensitivity { get; init; } = new();

    /// <summary>Margin of the two one-sided tests, on the analysis scale; null asks none.</summary>
    public double? EquivalenceMargin { get; init; }
}
