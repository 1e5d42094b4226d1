using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Endpoints;

/// <summary>Which endpoints a study wants and what is known of each.</summary>
public sealed class EndpointCatalogue
{
    /// <summary>The family of endpoints that have none.</summary>
    public const string NoFamily = "all";

    private const int NamesShown = 5;

    // Comparing a misspelt pattern with every name of a very wide table would take longer than reading it.
    private const int MostNamesCompared = 20_000;

    private readonly EndpointSection _section;
    private readonly string _dictionaryFile;
    private readonly Dictionary<string, EndpointInfo> _entries;
    private readonly NamePattern[] _include;
    private readonly NamePattern[] _exclude;
    private readonly bool[] _excludeUsed;

    private EndpointCatalogue(EndpointSection section, Dictionary<string, EndpointInfo> entries)
    {
        _section = section;
        _dictionaryFile = section.Dictionary is null ? "" : Path.GetFileName(section.Dictionary);
        _entries = entries;
        _include = [.. section.Include.Select(text => new NamePattern(text))];
        _exclude = [.. section.Exclude.Select(text => new NamePattern(text))];
        _excludeUsed = new bool[_exclude.Length];
        Kinds = entries.Values.Where(entry => Wanted(entry.Name)).Select(entry => entry.Kind).Append(section.Kind).ToHashSet();
        Array.Clear(_excludeUsed);
        Warnings = [.. UnwantedEntries()];
    }

    /// <summary>What looks odd before any data are read, one sentence each.</summary>
    public IReadOnlyList<string> Warnings { get; }

    /// <summary>True where the dictionary gives any endpoint a detection limit.</summary>
    public bool HasDetectionLimits => _entries.Values.Any(entry => entry.DetectionLimit is not null);

    /// <summary>The kinds of endpoint that the study can meet: that of endpoints without an entry, and those of the wanted entries.</summary>
    public IReadOnlySet<EndpointKind> Kinds { get; }

    /// <summary>Reads the study's dictionary, if it names one.</summary>
    /// <exception cref="RefusalException">The dictionary has an unknown column, kind or transform, a number that is none, or an endpoint twice; names the line.</exception>
    public static EndpointCatalogue Read(StudyDefinition study) =>
        new(study.Endpoints, study.Endpoints.Dictionary is null ? [] : DictionaryReading.Read(study));

    /// <summary>True where the endpoint fits a pattern of <c>include</c> and none of <c>exclude</c>. May be called from several threads.</summary>
    public bool Wanted(string name)
    {
        if (!Array.Exists(_include, pattern => pattern.Matches(name)))
            return false;
        for (int pattern = 0; pattern < _exclude.Length; pattern++)
        {
            if (!_exclude[pattern].Matches(name))
                continue;
            _excludeUsed[pattern] = true;
            return false;
        }

        return true;
    }

    /// <summary>What is known of an endpoint; the study file's defaults where the dictionary has no entry.</summary>
    public EndpointInfo Describe(string name) =>
        _entries.TryGetValue(name, out var entry)
            ? entry
            : new EndpointInfo
            {
                Name = name,
                Kind = _section.Kind,
                Transform = _section.Kind == EndpointKind.Continuous ? _section.Transform : Transform.None,
            };

    /// <summary>What was named and never met, one sentence each: entries of the dictionary, patterns of include and exclude.</summary>
    /// <param name="names">The endpoints of the data that are wanted; <see cref="Wanted"/> has been asked for every name of the data.</param>
    public IReadOnlyList<string> Unmet(IReadOnlyCollection<string> names)
    {
        HashSet<string> met = [.. names];
        var sentences = new List<string>();
        string[] absent = [.. _entries.Keys.Where(name => Wanted(name) && !met.Contains(name))];
        if (absent.Length > 0)
            sentences.Add($"{_dictionaryFile}: {Endpoints(absent.Length)} not in the data: {Listing.Of(absent, NamesShown)}.");
        foreach (NamePattern pattern in _include)
        {
            if (!names.Any(pattern.Matches))
                sentences.Add($"endpoints.include: '{pattern.Text}' fits no endpoint that is wanted.{Suggestion(pattern.Text, names)}");
        }

        for (int pattern = 0; pattern < _exclude.Length; pattern++)
        {
            if (!_excludeUsed[pattern])
                sentences.Add($"endpoints.exclude: '{_exclude[pattern].Text}' leaves out nothing.{Suggestion(_exclude[pattern].Text, names)}");
        }

        return sentences;
    }

    private IEnumerable<string> UnwantedEntries()
    {
        string[] unwanted = [.. _entries.Keys.Where(name => !Array.Exists(_include, pattern => pattern.Matches(name)))];
        if (unwanted.Length > 0)
            yield return $"{_dictionaryFile}: {Endpoints(unwanted.Length)} outside endpoints.include: {Listing.Of(unwanted, NamesShown)}.";
    }

    private static string Endpoints(int count) => count == 1 ? "1 endpoint is" : $"{count} endpoints are";

    private static string Suggestion(string pattern, IReadOnlyCollection<string> names) =>
        !pattern.Contains('*', StringComparison.Ordinal) && names.Count <= MostNamesCompared && NearestName.Of(pattern, names) is { } nearest
            ? $" Did you mean '{nearest}'?"
            : "";
}
