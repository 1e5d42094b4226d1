using MatchedSuite.Study.Definition.Reading;

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
            study.Data.Sample, design.Visit?.Window?.Column,
            .. DesignRules.Links(design).Select(link => link.Column),
            .. design.MatchOn.Select(rule => rule.Column), .. design.Covariates,
        ];
        return named.OfType<string>().ToHashSet(StringComparer.Ordinal);
    }
}
