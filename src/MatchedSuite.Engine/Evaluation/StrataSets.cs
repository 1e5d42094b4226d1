using MatchedSuite.Engine.Rows;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>The sets of every stratum, and all sets.</summary>
internal sealed class StrataSets
{
    private readonly int[] _all;
    private readonly int[][] _strata;

    private StrataSets(int[] all, int[][] strata)
    {
        _all = all;
        _strata = strata;
    }

    /// <summary>Number of strata.</summary>
    public int Count => _strata.Length;

    /// <summary>Sorts an arrangement's sets into its strata.</summary>
    public static StrataSets Of(Arrangement arrangement)
    {
        int[] all = [.. Enumerable.Range(0, arrangement.Sets.Length)];
        return new StrataSets(all, [.. arrangement.Strata.Select((_, stratum) => all.Where(set => arrangement.StratumOfSet[set] == stratum).ToArray())]);
    }

    /// <summary>The sets of a stratum, ascending; all of them for <see cref="ResultRow.AllStrata"/>.</summary>
    public ReadOnlySpan<int> SetsOf(short stratum) => stratum == ResultRow.AllStrata ? _all : _strata[stratum];
}
