using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Tables;

/// <summary>Adjusts p-values that stand in a table of any origin.</summary>
/// <remarks>
/// With families each is adjusted as if there were no other, but for procedures that go from family to family: these take the
/// families, and the others the rows, in the order of the table.
/// </remarks>
public sealed class TableAdjustment
{
    private readonly TableAdjustmentOptions _options;
    private readonly PValueTable _table;
    private readonly PValueAdjustment[] _rules;
    private readonly Probability[][] _adjusted;

    private TableAdjustment(TableAdjustmentOptions options, PValueTable table, PValueAdjustment[] rules)
    {
        _options = options;
        _table = table;
        _rules = rules;
        _adjusted = [.. rules.Select(Adjust)];
    }

    /// <summary>Number of rows with a p-value.</summary>
    public int Tested => _table.P.Count(p => !p.IsMissing);

    /// <summary>Number of rows.</summary>
    public int Rows => _table.P.Length;

    /// <summary>For each adjustment its name and how many hypotheses it rejects at the level.</summary>
    public IReadOnlyList<(string Method, int Rejected)> Findings =>
        [.. _rules.Select((rule, position) => (rule.Name, _adjusted[position].Count(p => p.IsAtMost(_options.Level))))];

    /// <summary>Reads the table and adjusts.</summary>
    /// <exception cref="RefusalException">The table cannot be read, a column is not there, a p-value or weight is none, a method is not known or lacks what it needs.</exception>
    public static TableAdjustment Run(TableAdjustmentOptions options)
    {
        PValueAdjustment[] rules = [.. options.Methods.Select(name => Rule(name, options))];
        return new TableAdjustment(options, PValueTable.Read(options, rules), rules);
    }

    /// <summary>Writes the table with the adjusted columns to a file in the format of its ending.</summary>
    /// <exception cref="RefusalException">The ending tells no format, or the file is the table itself.</exception>
    public void Write(string path)
    {
        if (Path.GetFullPath(path) == Path.GetFullPath(_options.Table))
            throw new RefusalException(path, "this is the table that is read", "another file", "Give --out another name; inputs are never replaced.");
        TableCopy.Write(_options.Table, TextDialect.Usual, Added(), path);
    }

    /// <summary>Writes the table with the adjusted columns as CSV.</summary>
    public void Write(TextWriter writer) => TableCopy.Write(_options.Table, TextDialect.Usual, Added(), writer, ',');

    /// <summary>With confidence 1 − level, how many of the rows with the listed names are true discoveries at least.</summary>
    /// <param name="path">File with one name a line.</param>
    /// <returns>The bound, and the number of names.</returns>
    /// <exception cref="RefusalException">The file cannot be read, or a name is listed twice or is not in the table exactly once.</exception>
    public (int TrueDiscoveries, int Listed) BoundOf(string path)
    {
        int[] rows = NameList.Read(path, _table);
        return (ClosedTesting.WithSimes(_table.P, _options.Level).TrueDiscoveriesAtLeast(rows), rows.Length);
    }

    private static PValueAdjustment Rule(string name, TableAdjustmentOptions options)
    {
        string[] able = [.. AdjustmentTable.OverPValues.Select(rule => rule.Name)];
        if (AdjustmentTable.OverPValues.FirstOrDefault(rule => rule.Name == name) is not { } rule)
        {
            bool known = KnownNames.Adjustments.Contains(name);
            throw new RefusalException(
                "--method", known ? $"'{name}' needs more than p-values" : $"the adjustment '{name}' is not known", $"one or more of {Listing.Of(able)}",
                !known && NearestName.Of(name, able) is { } nearest ? $"Did you mean '{nearest}'?" : "");
        }

        if (rule.GoesFromFamilyToFamily && options.Family is null)
            throw new RefusalException("--method", $"'{name}' goes from family to family, and no families are given", "the column with the families", "Add --family COLUMN.");
        if (name == "weighted-bh" && options.Weight is null)
            throw new RefusalException("--method", $"'{name}' needs weights, and none are given", "the column with the weights", "Add --weight COLUMN, or ask for bh.");
        return rule;
    }

    private Probability[] Adjust(PValueAdjustment rule)
    {
        var families = new Families(FamilyNumbers.Of(_table.Families));
        var adjusted = new Probability[_table.P.Length];
        if (rule.GoesFromFamilyToFamily || families.Count == 1)
        {
            rule.Procedure(new Hypotheses { P = _table.P, Weights = _table.Weights, Families = families }, adjusted);
            return adjusted;
        }

        for (int family = 0; family < families.Count; family++)
        {
            int[] members = families.Members(family).ToArray();
            var own = new Probability[members.Length];
            rule.Procedure(
                new Hypotheses
                {
                    P = Array.ConvertAll(members, at => _table.P[at]),
                    Weights = Array.ConvertAll(members, at => _table.Weights[at]),
                    Families = new Families(new int[members.Length]),
                },
                own);
            for (int i = 0; i < members.Length; i++)
                adjusted[members[i]] = own[i];
        }

        return adjusted;
    }

    private List<AddedColumn> Added()
    {
        var added = new List<AddedColumn>();
        for (int rule = 0; rule < _rules.Length; rule++)
        {
            Probability[] adjusted = _adjusted[rule];
            added.Add(new AddedColumn($"p_{_rules[rule].ColumnName}", Array.ConvertAll(adjusted, p => p.Value), row => PValueText.Of(adjusted[row])));
            added.Add(new AddedColumn($"rejected_{_rules[rule].ColumnName}", Array.ConvertAll(adjusted, p => p.IsAtMost(_options.Level))));
        }

        return added;
    }
}
