using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The p-values of all rows of a run and which of them are adjusted together.</summary>
internal sealed class HypothesisTable
{
    private readonly EndpointTraits _traits;
    private readonly List<HypothesisGroup> _groups = [];
    private readonly int[] _groupOfRow;
    private int[][] _members = [];

    private HypothesisTable(int rows, EndpointTraits traits)
    {
        P = new Probability[rows];
        SmallestPossible = new double[rows];
        Endpoints = new int[rows];
        Contrasts = new short[rows];
        _traits = traits;
        _groupOfRow = new int[rows];
    }

    /// <summary>The p-value of each row; missing where untested.</summary>
    public Probability[] P { get; }

    /// <summary>The smallest p-value each row could have had; NaN where there is no floor.</summary>
    public double[] SmallestPossible { get; }

    /// <summary>The endpoint of each row.</summary>
    public int[] Endpoints { get; }

    /// <summary>The contrast of each row.</summary>
    public short[] Contrasts { get; }

    /// <summary>The groups, in order of first appearance.</summary>
    public IReadOnlyList<HypothesisGroup> Groups => _groups;

    /// <summary>The group of a row.</summary>
    public int GroupOf(int row) => _groupOfRow[row];

    /// <summary>The tested rows of a group, in the order of testing: dictionary, then data.</summary>
    public int[] Members(int group) => _members[group];

    /// <summary>Rows in the order of testing: that of the dictionary, then that of the data.</summary>
    public int[] InOrderOfTesting(IReadOnlyCollection<int> rows)
    {
        int[] sorted = [.. rows];
        Array.Sort(Array.ConvertAll(sorted, row => ((long)_traits.Place(Endpoints[row]) << 32) | (uint)row), sorted);
        return sorted;
    }

    /// <summary>Sorts every row of a store into its group.</summary>
    public static HypothesisTable Of(RowStore rows, AnalysisPlan plan, EndpointTraits traits)
    {
        AnalysisSection analysis = plan.Study.Analysis;
        var known = new Dictionary<(short Contrast, short Stratum, short Method, string? Family), int>();
        var table = new HypothesisTable(rows.Count, traits);
        rows.Scan((int position, in ResultRow row) =>
        {
            short method = row.Primary == 1 ? HypothesisGroup.PrimaryMethods : row.Method;
            short contrast = analysis.AcrossContrasts ? HypothesisGroup.AllContrasts : row.Contrast;
            string? family = analysis.Family == FamilyRule.ByFamily ? traits.Family(row.Endpoint) : null;
            var key = (contrast, row.Stratum, method, family);
            if (!known.TryGetValue(key, out int group))
            {
                group = table._groups.Count;
                known.Add(key, group);
                table._groups.Add(new HypothesisGroup(contrast, row.Stratum, method, family));
            }

            table._groupOfRow[position] = group;
            table.P[position] = row.P;
            table.SmallestPossible[position] = row.SmallestPossibleP.Value;
            table.Contrasts[position] = row.Contrast;
            table.Endpoints[position] = row.Endpoint;
        });
        table._members = table.SortedMembers();
        return table;
    }

    private int[][] SortedMembers()
    {
        var sizes = new int[Groups.Count];
        for (int row = 0; row < P.Length; row++)
        {
            if (!P[row].IsMissing)
                sizes[_groupOfRow[row]]++;
        }

        int[][] members = [.. sizes.Select(size => new int[size])];
        Array.Clear(sizes);
        for (int row = 0; row < P.Length; row++)
        {
            if (!P[row].IsMissing)
                members[_groupOfRow[row]][sizes[_groupOfRow[row]]++] = row;
        }

        return Array.ConvertAll(members, InOrderOfTesting);
    }
}
