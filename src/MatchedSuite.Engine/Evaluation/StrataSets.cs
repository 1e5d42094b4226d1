using MatchedSuite.Engine.Rows;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>The sets behind each row of a method: all sets and those of every stratum, or those of each group.</summary>
internal sealed class StrataSets
{
    private readonly short[] _codes;
    private readonly int[][] _sets;

    private StrataSets(short[] codes, int[][] sets)
    {
        _codes = codes;
        _sets = sets;
    }

    /// <summary>Stratum codes in the order of their rows.</summary>
    public ReadOnlySpan<short> Codes => _codes;

    /// <summary>True where strata can be compared: all sets come first, then two strata or more.</summary>
    public bool Comparable => _codes[0] == ResultRow.AllStrata && _codes.Length > 2;

    /// <summary>All sets of an arrangement, then those of each stratum.</summary>
    public static StrataSets Of(Arrangement arrangement) => Of(arrangement, _ => true);

    /// <summary>The sets that take part in a comparison, then those of each stratum.</summary>
    public static StrataSets Of(Arrangement arrangement, Func<int, bool> takesPart)
    {
        int[] all = [.. Enumerable.Range(0, arrangement.Sets.Length).Where(takesPart)];
        return new StrataSets(
            [ResultRow.AllStrata, .. Enumerable.Range(0, arrangement.Strata.Length).Select(stratum => (short)stratum)],
            [all, .. arrangement.Strata.Select((_, stratum) => all.Where(set => arrangement.StratumOfSet[set] == stratum).ToArray())]);
    }

    /// <summary>The sets of each of two groups, under codes behind those of the strata.</summary>
    public static StrataSets OfGroups(Arrangement arrangement, Func<int, bool> takesPart)
    {
        int[] all = [.. Enumerable.Range(0, arrangement.Sets.Length).Where(takesPart)];
        short first = (short)arrangement.Strata.Length;
        return new StrataSets([first, (short)(first + 1)], [.. Enumerable.Range(0, 2).Select(group => all.Where(set => arrangement.GroupOfSet[set] == group).ToArray())]);
    }

    /// <summary>The sets behind a row, ascending.</summary>
    /// <param name="position">Position in <see cref="Codes"/>.</param>
    public ReadOnlySpan<int> SetsAt(int position) => _sets[position];
}
