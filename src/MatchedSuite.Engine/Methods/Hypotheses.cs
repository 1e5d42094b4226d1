using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Engine.Methods;

/// <summary>What an adjustment knows of the hypotheses that it adjusts together, in the order of testing.</summary>
/// <remarks>
/// The order is that of the endpoint dictionary, then that of the data; families are numbered in the order in which it
/// meets them. Only procedures over ordered hypotheses depend on it.
/// </remarks>
public readonly ref struct Hypotheses
{
    /// <summary>The p-values; missing ones are no hypotheses.</summary>
    public required ReadOnlySpan<Probability> P { get; init; }

    /// <summary>One weight a hypothesis, 0 or more; 1 where none is given.</summary>
    public required ReadOnlySpan<double> Weights { get; init; }

    /// <summary>The family of each hypothesis.</summary>
    public required Families Families { get; init; }

    /// <summary>True where some weights differ, so that they matter.</summary>
    public bool AreWeighted
    {
        get
        {
            for (int i = 1; i < Weights.Length; i++)
            {
                if (Weights[i] != Weights[0])
                    return true;
            }

            return false;
        }
    }
}
