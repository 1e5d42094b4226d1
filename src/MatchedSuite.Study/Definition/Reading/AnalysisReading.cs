using MatchedSuite.Statistics;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the section <c>analysis</c>.</summary>
internal static class AnalysisReading
{
    private const string Level = "a number above 0 and below 1";

    /// <summary>The section; defaults where it, or a key of it, is not written.</summary>
    public static AnalysisSection Read(Section? section, DesignSection design, Capabilities capabilities)
    {
        var usual = new AnalysisSection { Methods = MethodReading.Read(section, design, capabilities), Adjust = UsualAdjustments(capabilities) };
        if (section is null)
            return usual;
        var analysis = usual with
        {
            Sides = section.Choice<Sides>("sides") ?? usual.Sides,
            Confidence = section.Real("confidence", IsLevel, Level) ?? usual.Confidence,
            Adjust = section.NamedList("adjust", KnownNames.Adjustments) ?? usual.Adjust,
            Family = section.Available("family", section.Choice<FamilyRule>("family") ?? usual.Family, capabilities.Families),
            AcrossContrasts = section.Named("across", ["none", "contrasts"]) == "contrasts",
            Alpha = section.Real("alpha", IsLevel, Level) ?? usual.Alpha,
            Fdr = section.Real("fdr", IsLevel, Level) ?? usual.Fdr,
            Resamples = (int)(section.Whole("resamples", 1, 1_000_000_000) ?? usual.Resamples),
            MinimumSets = (int)(section.Whole("minimum-sets", 2, 1_000_000_000) ?? usual.MinimumSets),
            Zeros = section.Choice<ZeroRule>("zeros") ?? usual.Zeros,
            Intervals = Intervals(section, capabilities),
            Sensitivity = Sensitivity(section),
            EquivalenceMargin = Margin(section),
        };
        section.Available("adjust", analysis.Adjust, capabilities.Adjustments);
        section.AvailableKey("across", analysis.AcrossContrasts, capabilities);
        section.AvailableKey("zeros", analysis.Zeros != ZeroRule.Drop, capabilities);
        section.AvailableKey("intervals", true, capabilities);
        section.AvailableKey("sensitivity", analysis.Sensitivity != new SensitivitySection(), capabilities);
        section.AvailableKey("equivalence", true, capabilities);
        if (analysis.AcrossContrasts && design.Kind != DesignKind.Visits)
            throw section.RefuseKey("across", $"a design of kind '{WrittenName.Of(design.Kind)}' has one contrast", "the key only with kind 'visits'", "Remove the key.");
        return analysis;
    }

    private static string[] UsualAdjustments(Capabilities capabilities) =>
        [.. new AnalysisSection().Adjust.Where(capabilities.Adjustments.Contains)];

    private static IReadOnlyList<IntervalKind> Intervals(Section section, Capabilities capabilities)
    {
        var kinds = section.Choices<IntervalKind>("intervals") ?? [];
        if (capabilities.Keys.Contains("analysis.intervals"))
            section.Available("intervals", kinds, capabilities.Intervals);
        return kinds;
    }

    private static SensitivitySection Sensitivity(Section section) =>
        section.Inner("sensitivity") is not { } inner
            ? new SensitivitySection()
            : new SensitivitySection
            {
                Gamma = inner.IsTrue("gamma") ?? false,
                EValue = inner.IsTrue("e-value") ?? false,
                Influence = inner.IsTrue("influence") ?? false,
            };

    private static double? Margin(Section section)
    {
        const string Expected = "a number above 0, on the analysis scale";
        return section.Inner("equivalence") is { } inner
            ? inner.Real("margin", value => value > 0, Expected) ?? throw inner.Absent("margin", Expected)
            : null;
    }

    private static bool IsLevel(double value) => value is > 0 and < 1;
}
