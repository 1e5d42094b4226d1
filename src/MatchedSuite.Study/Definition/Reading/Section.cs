using MatchedSuite.Storage;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>A mapping of the study file, read key by key; each key that is not known has been refused when it is made.</summary>
internal sealed class Section
{
    private readonly string _file;
    private readonly string _path;
    private readonly MapNode _map;

    private Section(string file, string path, MapNode map, string knownPath)
    {
        _file = file;
        _path = path;
        _map = map;
        RefuseUnknownKeys(knownPath);
    }

    /// <summary>The whole file.</summary>
    public static Section Root(string file, MapNode map) => new(file, "", map, "");

    /// <summary>Path of a key of this mapping.</summary>
    public string PathOf(string key) => _path.Length == 0 ? key : $"{_path}.{key}";

    /// <summary>True where the key is written.</summary>
    public bool Has(string key) => _map.Find(key) is not null;

    /// <summary>The inner mapping under a key; null when it is not written.</summary>
    public Section? Inner(string key) =>
        Value(key) switch
        {
            null => null,
            MapNode map => new Section(_file, PathOf(key), map, KnownPath(PathOf(key))),
            var other => throw Refuse(key, other, $"{other.Description} stands here", $"keys with values ({KeysOf(PathOf(key))})"),
        };

    /// <summary>The inner mapping under a key that must be written.</summary>
    public Section RequiredInner(string key) => Inner(key) ?? throw Absent(key, $"keys with values ({KeysOf(PathOf(key))})");

    /// <summary>The mappings of a list; null when the key is not written.</summary>
    public IReadOnlyList<Section>? InnerList(string key)
    {
        if (Items(key, "a list") is not { } items)
            return null;
        var sections = new List<Section>(items.Count);
        foreach (Node item in items)
        {
            string path = $"{PathOf(key)}[{sections.Count + 1}]";
            if (item is not MapNode map)
                throw RefuseAt(path, item, $"{item.Description} stands here", $"keys with values ({KeysOf(PathOf(key) + "[]")})");
            sections.Add(new Section(_file, path, map, KnownPath(PathOf(key)) + "[]"));
        }

        return sections;
    }

    /// <summary>The single value under a key; null when it is not written.</summary>
    /// <param name="key">Name of the key.</param>
    /// <param name="expected">What belongs there, for the message.</param>
    public ScalarNode? Scalar(string key, string expected) =>
        Value(key) switch
        {
            null => null,
            ScalarNode { IsNull: false } scalar => scalar,
            var other => throw Refuse(key, other, $"{other.Description} stands here", expected),
        };

    /// <summary>The single values of a list; null when the key is not written.</summary>
    /// <param name="key">Name of the key.</param>
    /// <param name="expected">What belongs there, for the message.</param>
    public IReadOnlyList<ScalarNode>? Scalars(string key, string expected)
    {
        if (Items(key, expected) is not { } items)
            return null;
        var scalars = new List<ScalarNode>(items.Count);
        foreach (Node item in items)
        {
            if (item is not ScalarNode { IsNull: false } scalar)
                throw RefuseAt($"{PathOf(key)}[{scalars.Count + 1}]", item, $"{item.Description} stands here", expected);
            scalars.Add(scalar);
        }

        return scalars;
    }

    /// <summary>A refusal at the value of a key, or at the mapping where the key is not written.</summary>
    public RefusalException Refuse(string key, string found, string expected, string remedy = "") =>
        RefuseAt(PathOf(key), _map.Find(key)?.Value ?? _map, found, expected, remedy);

    /// <summary>A refusal at the key itself: it should not be here.</summary>
    public RefusalException RefuseKey(string key, string found, string expected, string remedy = "") =>
        RefuseAt(PathOf(key), (Node?)_map.Find(key)?.Key ?? _map, found, expected, remedy);

    /// <summary>A refusal at a value under a key.</summary>
    public RefusalException Refuse(string key, Node at, string found, string expected, string remedy = "") =>
        RefuseAt(PathOf(key), at, found, expected, remedy);

    /// <summary>A refusal because a key that must be written is not.</summary>
    public RefusalException Absent(string key, string expected, string remedy = "") =>
        RefuseAt(PathOf(key), _map, "the key is missing", expected, remedy);

    private Node? Value(string key)
    {
        if (!StudyKeys.All.Contains(KnownPath(PathOf(key))))
            throw new InvalidOperationException($"The key '{PathOf(key)}' is read but not listed among the known keys.");
        return _map.Find(key)?.Value;
    }

    private IReadOnlyList<Node>? Items(string key, string expected) =>
        Value(key) switch
        {
            null => null,
            ListNode list => list.Items,
            ScalarNode { IsNull: false } scalar =>
                throw Refuse(key, scalar, $"{scalar.Description} stands here", expected, $"Write it as a list: [{scalar.Text}]."),
            var other => throw Refuse(key, other, $"{other.Description} stands here", expected),
        };

    private void RefuseUnknownKeys(string knownPath)
    {
        string[] known = [.. StudyKeys.Under(knownPath)];
        foreach (var (key, _) in _map.Entries)
        {
            if (known.Contains(key.Text))
                continue;
            string remedy = NearestName.Of(key.Text, known) is { } nearest ? $"Did you mean '{nearest}'?" : HintElsewhere(key.Text);
            throw RefuseAt(PathOf(key.Text), key, "the key is not known", $"one of {Listing.Of(known)}", remedy);
        }
    }

    // A key that is right but stands in the wrong section is the commonest slip after a misspelling.
    private static string HintElsewhere(string key)
    {
        string ending = "." + key;
        return StudyKeys.All.FirstOrDefault(path => path == key || path.EndsWith(ending, StringComparison.Ordinal)) is { } path
            ? $"The key '{path}' exists: is the indentation right?"
            : "";
    }

    private RefusalException RefuseAt(string path, Node at, string found, string expected, string remedy = "") =>
        new(KeyPlace.Of(_file, at.Line, at.Column, path), found, expected, remedy);

    private static string KeysOf(string path) => string.Join(", ", StudyKeys.Under(KnownPath(path)));

    // Entries of lists are numbered in messages and unnumbered in the list of known keys.
    private static string KnownPath(string path)
    {
        int open = path.IndexOf('[');
        return open < 0 ? path : string.Concat(path.AsSpan(0, open + 1), path.AsSpan(path.IndexOf(']')));
    }
}
