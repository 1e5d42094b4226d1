namespace MatchedSuite.Study.Definition;

/// <summary>The columns of the sample sheet that a study names: keys, links, roles, strata, promises, covariates. None is an endpoint.</summary>
public static class LinkingColumns
{
    /// <summary>Their names.</summary>
    public static IReadOnlySet<string> Of(StudyDefinition study)
    {
        DesignSection design = study.Design;
        string?[] named =
        [
            study.Data.Sample, design.Set, design.Subject, design.Role?.Column, design.Exposure, design.Visit?.Column,
            design.Arm?.Column, design.Period?.Column, design.Treatment?.Column, design.Stratum, design.PersonTime,
            .. design.MatchOn.Select(rule => rule.Column), .. design.Covariates,
        ];
        return named.OfType<string>().ToHashSet(StringComparer.Ordinal);
    }
}
