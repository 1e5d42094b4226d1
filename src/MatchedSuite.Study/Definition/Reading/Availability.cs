using MatchedSuite.Storage;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Refuses what a study file may say but this version cannot do.</summary>
internal static class Availability
{
    /// <summary>Refuses a value that is not among the available ones.</summary>
    public static T Available<T>(this Section section, string key, T value, IReadOnlySet<T> available)
        where T : struct, Enum
    {
        if (section.Has(key) && !available.Contains(value))
            throw NotHere(section, key, WrittenName.Of(value), Enum.GetValues<T>().Where(available.Contains).Select(WrittenName.Of));
        return value;
    }

    /// <summary>Refuses the first of several values that is not among the available ones.</summary>
    public static void Available<T>(this Section section, string key, IReadOnlyList<T> values, IReadOnlySet<T> available)
        where T : struct, Enum
    {
        foreach (T value in values)
            section.Available(key, value, available);
    }

    /// <summary>Refuses the first name that is not among the available ones.</summary>
    public static void Available(this Section section, string key, IReadOnlyList<string> names, IReadOnlyList<string> available)
    {
        foreach (string name in names)
        {
            if (!available.Contains(name))
                throw NotHere(section, key, name, available);
        }
    }

    /// <summary>Refuses an optional key that asks for something where its effect is not available.</summary>
    /// <param name="section">Mapping the key stands in.</param>
    /// <param name="key">Name of the key.</param>
    /// <param name="asks">False where the value written is the one that asks for nothing.</param>
    /// <param name="capabilities">What is available.</param>
    public static void AvailableKey(this Section section, string key, bool asks, Capabilities capabilities)
    {
        string path = section.PathOf(key);
        if (!asks || !section.Has(key) || capabilities.Keys.Contains(path))
            return;
        string[] here = [.. StudyKeys.Optional.Where(capabilities.Keys.Contains)];
        string[] designs = [.. capabilities.KeysOfDesign.Where(of => of.Value.Contains(path)).Select(of => WrittenName.Of(of.Key))];
        string elsewhere = designs.Length == 0 ? "" : $" for this kind of design, only for {Listing.Of(designs)}";
        throw section.RefuseKey(
            key,
            $"'{path}' is not available in this version{elsewhere}",
            here.Length == 0 ? "a study without it" : $"a study without it; of the optional keys this version has {Listing.Of(here)}",
            "Remove the key.");
    }

    private static RefusalException NotHere(Section section, string key, string name, IEnumerable<string> available)
    {
        string[] here = [.. available];
        return section.Refuse(
            key,
            $"'{name}' is not available in this version",
            here.Length == 0 ? "the key to be absent, since nothing is available for it" : $"one of what is available: {Listing.Of(here)}");
    }
}
