namespace MatchedSuite.Study.Definition;

/// <summary>Every key of a study file, by its path; an entry of a list of mappings is written <c>[]</c>.</summary>
/// <remarks>The reader knows a key only when it stands here; the published schema is held against this list.</remarks>
public static class StudyKeys
{
    /// <summary>The paths, parents before their children.</summary>
    public static IReadOnlyList<string> All { get; } =
    [
        "schema",
        "study", "study.name", "study.question", "study.seed",
        "data", "data.samples", "data.sample", "data.values", "data.layout", "data.endpoint", "data.value",
        "data.missing", "data.delimiter", "data.decimal",
        "design", "design.kind", "design.set", "design.subject",
        "design.role", "design.role.column", "design.role.index", "design.role.reference",
        "design.exposure", "design.exposure.column",
        "design.visit", "design.visit.column", "design.visit.order", "design.visit.reference",
        "design.visit.window", "design.visit.window.column", "design.visit.window.limits",
        "design.visit.window.limits[].visit", "design.visit.window.limits[].from", "design.visit.window.limits[].to",
        "design.contrasts",
        "design.arm", "design.arm.column", "design.arm.index", "design.arm.reference",
        "design.period", "design.period.column", "design.period.order",
        "design.treatment", "design.treatment.column", "design.treatment.index", "design.treatment.reference",
        "design.stratum", "design.replicates", "design.reuse",
        "design.match-on", "design.match-on[].column", "design.match-on[].within", "design.match-on[].equal",
        "design.covariates", "design.person-time",
        "endpoints", "endpoints.dictionary", "endpoints.include", "endpoints.exclude", "endpoints.kind",
        "endpoints.transform", "endpoints.below-limit", "endpoints.scale",
        "analysis", "analysis.continuous", "analysis.binary", "analysis.ordinal", "analysis.count",
        "analysis.sides", "analysis.confidence", "analysis.adjust", "analysis.family", "analysis.across",
        "analysis.alpha", "analysis.fdr", "analysis.resamples", "analysis.minimum-sets", "analysis.zeros",
        "analysis.intervals",
        "analysis.sensitivity", "analysis.sensitivity.gamma", "analysis.sensitivity.e-value", "analysis.sensitivity.influence",
        "analysis.equivalence", "analysis.equivalence.margin",
        "gates", "gates.unmatched-at-most", "gates.tolerance", "gates.missing-at-most",
        "output", "output.folder", "output.overwrite", "output.report", "output.top", "output.identifiers",
    ];

    /// <summary>Keys whose effect a version may not have yet; every other key always works.</summary>
    public static IReadOnlyList<string> Optional { get; } =
    [
        "design.exposure", "design.visit.window", "design.stratum", "design.reuse", "design.covariates", "design.person-time",
        "endpoints.below-limit", "endpoints.scale",
        "analysis.across", "analysis.zeros", "analysis.intervals", "analysis.sensitivity", "analysis.equivalence",
    ];

    /// <summary>The names of the keys directly under a path; the top level where it is empty.</summary>
    /// <param name="path">Path of a mapping, with <c>[]</c> for entries of lists.</param>
    public static IEnumerable<string> Under(string path)
    {
        string prefix = path.Length == 0 ? "" : path + ".";
        return All.Where(key => key.StartsWith(prefix, StringComparison.Ordinal))
            .Select(key => key[prefix.Length..])
            .Where(rest => rest.Length > 0 && !rest.Contains('.') && !rest.Contains('['));
    }
}
