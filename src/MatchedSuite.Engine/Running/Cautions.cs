using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Running;

/// <summary>What the numbers of a design cannot say, in sentences for summary and report.</summary>
internal static class Cautions
{
    private const string Screen =
        "A screen is not a diagnosis: these are associations within linked people, and association is not cause. Discuss findings with a "
        + "statistician and follow your local rules before anyone acts on them.";

    private const string Confounding =
        "Linking removes what the members of a set share; what still differs between them besides the role can explain a difference.";

    private const string BeforeAfter =
        "Both samples of a set come from the same person: a change without a control group may be time itself, ageing, season or the "
        + "regression of extreme values, whatever the treatment.";

    private const string MissingValues =
        "A set without both values is left out for that endpoint; this is fair only where values are missing for reasons unrelated to them.";

    /// <summary>The cautions for a study, in the order in which they are printed.</summary>
    public static IReadOnlyList<string> For(StudyDefinition study, bool someValuesMissing)
    {
        var cautions = new List<string> { Screen };
        cautions.Add(SamePerson(study.Design) ? BeforeAfter : Confounding);
        if (someValuesMissing)
            cautions.Add(MissingValues);
        return cautions;
    }

    private static bool SamePerson(DesignSection design) =>
        design.Kind == DesignKind.Visits || (design.Kind == DesignKind.Pairs && design.Subject is not null && design.Subject == design.Set);
}
