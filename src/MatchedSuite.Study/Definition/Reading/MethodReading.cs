using MatchedSuite.Storage;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the method lists of the section <c>analysis</c>, one for each kind of endpoint.</summary>
internal static class MethodReading
{
    /// <summary>The lists; a kind whose key is not written has the default of the design, or no entry where there is none.</summary>
    public static IReadOnlyDictionary<EndpointKind, IReadOnlyList<string>> Read(Section? section, DesignSection design, Capabilities capabilities)
    {
        var methods = new Dictionary<EndpointKind, IReadOnlyList<string>>();
        foreach (EndpointKind kind in Enum.GetValues<EndpointKind>())
        {
            IReadOnlyList<string>? names = section is null ? null : Named(section, kind, design, capabilities);
            names ??= Usual(kind, design, capabilities);
            if (names.Count > 0)
                methods[kind] = names;
        }

        return methods;
    }

    private static List<string>? Named(Section section, EndpointKind kind, DesignSection design, Capabilities capabilities)
    {
        string key = WrittenName.Of(kind);
        string expected = "a list of one or more of " + Listing.Of(Suitable(kind, design, KnownNames.MethodsFor(design.Kind, kind)));
        if (section.Texts(key, expected, fewest: 1) is not { } names)
            return null;
        foreach (ScalarNode scalar in section.Scalars(key, expected)!)
            RefuseUnsuitable(section, key, scalar, kind, design);
        section.Available(key, names, Suitable(kind, design, capabilities.MethodsFor(design.Kind, kind)));
        return names;
    }

    private static void RefuseUnsuitable(Section section, string key, ScalarNode scalar, EndpointKind kind, DesignSection design)
    {
        string name = scalar.Text;
        string[] suitable = Suitable(kind, design, KnownNames.MethodsFor(design.Kind, kind));
        if (suitable.Contains(name))
            return;
        string expected = suitable.Length == 0
            ? $"the key to be absent, since no method is known for {key} endpoints in a design of kind '{WrittenName.Of(design.Kind)}'"
            : "one of " + Listing.Of(suitable);
        if (!KnownNames.Methods.Contains(name))
        {
            string remedy = NearestName.Of(name, KnownNames.Methods) is { } nearest ? $"Did you mean '{nearest}'?" : "";
            throw section.Refuse(key, scalar, $"the method '{name}' is not known", expected, remedy);
        }

        string found = !KnownNames.MethodsFor(kind).Contains(name)
            ? $"the method '{name}' is not for {key} endpoints"
            : !KnownNames.MethodsFor(design.Kind, kind).Contains(name)
                ? $"the method '{name}' is not for a design of kind '{WrittenName.Of(design.Kind)}'"
                : design.Exposure is null
                    ? $"the method '{name}' is for a measured exposure, and the design has a role"
                    : $"the method '{name}' compares two roles, and the design has a measured exposure";
        throw section.Refuse(key, scalar, found, expected);
    }

    private static IReadOnlyList<string> Usual(EndpointKind kind, DesignSection design, Capabilities capabilities)
    {
        string[] available = Suitable(kind, design, capabilities.MethodsFor(design.Kind, kind));
        if (design.Exposure is not null)
            return available;
        IReadOnlyList<string> usual = capabilities.DefaultMethods.TryGetValue((design.Kind, kind), out var methods) ? methods : [];
        if (design.Kind != DesignKind.Visits)
            return usual;
        return [.. usual, .. design.Contrasts.Select(contrast => KnownNames.UsualMethod(contrast, kind)).OfType<string>().Where(available.Contains)];
    }

    // A measured exposure has one method, which nothing else has.
    private static string[] Suitable(EndpointKind kind, DesignSection design, IReadOnlyList<string> names) =>
        [.. names.Where(name => (name == KnownNames.WithinPairSlope) == (design.Exposure is not null))];
}
