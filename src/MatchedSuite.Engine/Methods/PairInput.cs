using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>One endpoint on complete pairs with everything a pair method may ask for beside it.</summary>
/// <param name="pairs">The endpoint.</param>
/// <param name="zeros">What the signed-rank test does with differences of zero.</param>
public readonly ref struct PairInput(PairSample pairs, ZeroRule zeros)
{
    /// <summary>The endpoint.</summary>
    public PairSample Pairs { get; } = pairs;

    /// <summary>What the signed-rank test does with differences of zero.</summary>
    public ZeroRule Zeros { get; } = zeros;

    /// <summary>Within-pair differences of the covariates, column after column; empty where none are named.</summary>
    public ReadOnlySpan<double> Covariates { get; init; }

    /// <summary>Within-pair differences of the exposure; empty where the role is the exposure.</summary>
    public ReadOnlySpan<double> Exposure { get; init; }

    /// <summary>Time at risk on the index side, one a pair; empty where all times are equal.</summary>
    public ReadOnlySpan<double> IndexTime { get; init; }

    /// <summary>Time at risk on the reference side, one a pair; empty where all times are equal.</summary>
    public ReadOnlySpan<double> ReferenceTime { get; init; }
}
