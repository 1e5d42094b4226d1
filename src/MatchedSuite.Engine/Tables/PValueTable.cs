using System.Globalization;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Statistics;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Tables;

/// <summary>The columns of a table that its adjustment needs, checked row by row.</summary>
internal sealed class PValueTable
{
    private const string ExpectedP = "a p-value from 0 to 1, or a missing mark ('', 'NA', 'NaN', '.')";
    private readonly TextTable _table;

    private PValueTable(TextTable table, string name)
    {
        _table = table;
        Names = table[name];
    }

    /// <summary>The p-value of each row; missing ones are no hypotheses.</summary>
    public Probability[] P { get; private init; } = [];

    /// <summary>The family of each row.</summary>
    public string[] Families { get; private init; } = [];

    /// <summary>The weight of each row.</summary>
    public double[] Weights { get; private init; } = [];

    /// <summary>The name of each row; null where it has none.</summary>
    public string?[] Names { get; }

    /// <summary>Where a row stands, for messages.</summary>
    public string Place(int row) => _table.Place(row);

    /// <summary>Reads and checks.</summary>
    public static PValueTable Read(TableAdjustmentOptions options, IReadOnlyList<PValueAdjustment> rules)
    {
        IReadOnlyList<string> header = TextTable.ReadHeader(options.Table, TextDialect.Usual);
        RefuseTaken(options, header, rules);
        string name = options.Name ?? (header.Count > 0 ? header[0] : options.P);
        var wanted = new HashSet<string?> { options.P, options.Family, options.Weight, name };
        TextTable table = TextTable.Read(options.Table, TextDialect.Usual, wanted.Contains);
        foreach (string column in wanted.OfType<string>())
            ColumnNames.Find(Path.GetFileName(options.Table), header, column);
        return new PValueTable(table, name)
        {
            P = [.. table[options.P].Select((cell, row) => PValue(table, options.P, cell, row))],
            Families = options.Family is { } family
                ? [.. table[family].Select(cell => cell ?? EndpointCatalogue.NoFamily)]
                : [.. Enumerable.Repeat(EndpointCatalogue.NoFamily, table.Rows)],
            Weights = options.Weight is { } weight
                ? [.. table[weight].Select((cell, row) => Weight(table, weight, cell, row))]
                : [.. Enumerable.Repeat(1.0, table.Rows)],
        };
    }

    private static void RefuseTaken(TableAdjustmentOptions options, IReadOnlyList<string> header, IReadOnlyList<PValueAdjustment> rules)
    {
        foreach (PValueAdjustment rule in rules)
        {
            foreach (string column in new[] { $"p_{rule.ColumnName}", $"rejected_{rule.ColumnName}" })
            {
                if (header.Contains(column))
                {
                    throw new RefusalException(
                        $"{Path.GetFileName(options.Table)}, header", $"there is a column '{column}' already", "a table without the columns that are added",
                        "Rename or remove it.");
                }
            }
        }
    }

    private static Probability PValue(TextTable table, string column, string? cell, int row)
    {
        if (cell is null)
            return Probability.Missing;
        string found = PValueText.Read(cell, out Probability p) switch
        {
            PValueFault.NotANumber => $"'{cell}' is not a number",
            PValueFault.Negative => $"{cell} is negative",
            PValueFault.AboveOne => $"{cell} is above 1",
            _ => "",
        };
        return found.Length == 0
            ? p
            : throw new RefusalException($"{table.Place(row)}, column '{column}'", found, ExpectedP, "Correct the cell, or mark it as missing.");
    }

    private static double Weight(TextTable table, string column, string? cell, int row)
    {
        if (cell is null)
            return 1;
        bool isNumber = double.TryParse(cell, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent,
            CultureInfo.InvariantCulture, out double weight);
        return isNumber && weight >= 0 && double.IsFinite(weight)
            ? weight
            : throw new RefusalException(
                $"{table.Place(row)}, column '{column}'", isNumber ? $"{cell} is no weight" : $"'{cell}' is not a number",
                "a finite number, 0 or more, or an empty cell for 1", "Correct the cell.");
    }
}
