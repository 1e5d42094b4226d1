using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Endpoints;

/// <summary>Reads the endpoint dictionary: one row an endpoint, the columns in any order, all but the first optional.</summary>
internal sealed class DictionaryReading
{
    private const string Name = "endpoint";
    private const string DetectionLimit = "detection_limit";

    private static readonly string[] Known = [Name, "label", "kind", "unit", "transform", DetectionLimit, "family", "weight", "primary"];
    private static readonly string[] Yes = ["yes", "true", "1"];
    private static readonly string[] No = ["no", "false", "0"];

    private readonly StudyDefinition _study;
    private readonly TextTable _table;

    private DictionaryReading(StudyDefinition study, TextTable table)
    {
        _study = study;
        _table = table;
    }

    /// <summary>The entries by name, in the dictionary's order.</summary>
    public static Dictionary<string, EndpointInfo> Read(StudyDefinition study)
    {
        TextTable table = TextTable.Read(study.Endpoints.Dictionary!, study.Data.Dialect);
        return new DictionaryReading(study, table).Entries();
    }

    private Dictionary<string, EndpointInfo> Entries()
    {
        RefuseColumns();
        string?[] names = _table[Name];
        var rows = new Dictionary<string, int>();
        var entries = new Dictionary<string, EndpointInfo>();
        for (int row = 0; row < names.Length; row++)
        {
            if (names[row] is not { } name)
                throw Refuse(row, Name, "the endpoint has no name", "the name of an endpoint in the data");
            if (!rows.TryAdd(name, row))
                throw Refuse(row, Name, $"the endpoint '{name}' is already on {_table.Place(rows[name])}", "every endpoint once", "Remove one of the two rows.");
            entries.Add(name, Entry(name, row));
        }

        return entries;
    }

    private EndpointInfo Entry(string name, int row)
    {
        EndpointKind kind = Kind(row);
        return new EndpointInfo
        {
            Name = name,
            Place = row,
            Label = Cell("label", row),
            Kind = kind,
            Unit = Cell("unit", row),
            Transform = TransformOf(row, kind),
            DetectionLimit = Number(DetectionLimit, row, value => value > 0, "a number above 0"),
            Family = Cell("family", row) ?? EndpointCatalogue.NoFamily,
            Weight = Number("weight", row, value => value >= 0, "a number, 0 or more") ?? 1,
            Primary = IsPrimary(row),
        };
    }

    private void RefuseColumns()
    {
        string file = Path.GetFileName(_table.Path);
        foreach (string column in _table.Columns)
        {
            if (!Known.Contains(column))
                throw new RefusalException($"{file}, header", $"the column '{column}' is not known in an endpoint dictionary", "columns among " + Listing.Of(Known), NearestName.Of(column, Known) is { } nearest ? $"Did you mean '{nearest}'?" : "Remove it.");
        }

        if (!_table.Contains(Name))
            throw new RefusalException($"{file}, header", $"there is no column '{Name}'", "a column with the names of the endpoints", "Name the column 'endpoint'.");
        const string Key = "endpoints.below-limit";
        if (_table.Contains(DetectionLimit) && _table[DetectionLimit].Any(cell => cell is not null) && !_study.Available.Keys.Contains(Key))
            throw new RefusalException($"{file}, column '{DetectionLimit}'", "detection limits are not available in this version", "a dictionary without them", "Empty or remove the column.");
    }

    private EndpointKind Kind(int row)
    {
        const string Column = "kind";
        if (Cell(Column, row) is not { } text)
            return _study.Endpoints.Kind;
        if (!WrittenName.TryParse(text, out EndpointKind kind))
            throw Unknown(row, Column, text, WrittenName.All<EndpointKind>());
        return _study.Analysis.Methods.ContainsKey(kind)
            ? kind
            : throw Refuse(row, Column, $"no method for {text} endpoints in this design is available in this version", "one of what is available: " + Listing.Of(_study.Analysis.Methods.Keys.Select(WrittenName.Of)));
    }

    private Transform TransformOf(int row, EndpointKind kind)
    {
        const string Column = "transform";
        if (Cell(Column, row) is not { } text)
            return kind == EndpointKind.Continuous ? _study.Endpoints.Transform : Transform.None;
        if (!WrittenName.TryParse(text, out Transform transform))
            throw Unknown(row, Column, text, WrittenName.All<Transform>());
        if (transform != Transform.None && kind != EndpointKind.Continuous)
            throw Refuse(row, Column, $"a {WrittenName.Of(kind)} endpoint has the transform '{text}'", "no transform, or the kind 'continuous'");
        IReadOnlySet<Transform> available = _study.Available.Transforms;
        return available.Contains(transform)
            ? transform
            : throw Refuse(row, Column, $"'{text}' is not available in this version", "one of what is available: " + Listing.Of(Enum.GetValues<Transform>().Where(available.Contains).Select(WrittenName.Of)));
    }

    private double? Number(string column, int row, Func<double, bool> allowed, string expected)
    {
        if (Cell(column, row) is not { } text)
            return null;
        bool number = CellNumber.TryRead(_table, _study.Data.Dialect, text, out double value);
        return number && allowed(value)
            ? value
            : throw Refuse(row, column, number ? $"{text} is not allowed here" : $"'{text}' is not a number", expected + ", or an empty cell");
    }

    private bool IsPrimary(int row)
    {
        const string Column = "primary";
        string? text = Cell(Column, row);
        if (text is null || No.Contains(text, StringComparer.OrdinalIgnoreCase))
            return false;
        return Yes.Contains(text, StringComparer.OrdinalIgnoreCase)
            ? true
            : throw Refuse(row, Column, $"'{text}' is neither yes nor no", "yes, no or an empty cell");
    }

    private string? Cell(string column, int row) => _table.Contains(column) ? _table[column][row] : null;

    private RefusalException Unknown(int row, string column, string text, IReadOnlyList<string> known) =>
        Refuse(row, column, $"'{text}' is not known", "one of " + Listing.Of(known), NearestName.Of(text, known) is { } nearest ? $"Did you mean '{nearest}'?" : "");

    private RefusalException Refuse(int row, string column, string found, string expected, string remedy = "") =>
        new($"{_table.Place(row)}, column '{column}'", found, expected, remedy);
}
