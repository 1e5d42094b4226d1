namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the section <c>endpoints</c>.</summary>
internal static class EndpointsReading
{
    private const string Patterns = "a list of endpoint names or patterns with *";

    /// <summary>The section; defaults where it is not written.</summary>
    public static EndpointSection Read(Section? section, string folder, Capabilities capabilities)
    {
        if (section is null)
            return new EndpointSection();
        string? dictionary = section.Text("dictionary", "the path of the endpoint dictionary");
        var usual = new EndpointSection();
        var endpoints = new EndpointSection
        {
            Dictionary = dictionary is null ? null : Path.GetFullPath(dictionary, folder),
            Include = section.Texts("include", Patterns, fewest: 1) ?? usual.Include,
            Exclude = section.Texts("exclude", Patterns) ?? usual.Exclude,
            Kind = section.Choice<EndpointKind>("kind") ?? usual.Kind,
            Transform = section.Available("transform", section.Choice<Transform>("transform") ?? usual.Transform, capabilities.Transforms),
            BelowLimit = section.Choice<BelowLimit>("below-limit") ?? usual.BelowLimit,
            PerStandardDeviation = section.Named("scale", ["none", "sd"]) == "sd",
        };
        section.AvailableKey("below-limit", true, capabilities);
        section.AvailableKey("scale", endpoints.PerStandardDeviation, capabilities);
        return endpoints;
    }
}
