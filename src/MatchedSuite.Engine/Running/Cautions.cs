using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

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
        "The samples of a set come from the same person: a change without a control group may be time itself, ageing, season or the "
        + "regression of extreme values, whatever the treatment.";

    private const string MatchedSets =
        "Odds ratios are within matched sets and hold for members of one set; they estimate a relative risk only where the outcome is rare or "
        + "the controls were sampled at the cases' times.";

    private const string MatchedOn =
        "What the sets were matched on cannot be estimated from them, and matching on a consequence of the disease or the exposure hides part of the difference.";

    private const string AfterTheFact =
        "A sample taken after the diagnosis may show the disease or its treatment, not what came before it.";

    private const string ReusedControls =
        "Some people serve in several sets: the sets are not independent, so standard errors and p-values can be too small.";

    private const string MembersMissing =
        "A member without the value leaves its set, and a set left without one of the roles leaves with it; this is fair only where values are missing for reasons unrelated to them.";

    private const string Arms =
        "The change of one arm less that of the other is an effect of treatment only where chance put the subjects into the arms; otherwise "
        + "whatever else differs between the arms can explain it. The paired results of each arm alone cannot tell treatment from time, and "
        + "that one arm changes significantly and the other does not is no test of their difference.";

    private const string CarryOver =
        "A crossover supposes that nothing of the first treatment lasts into the second period. The test of carry-over has little power: "
        + "do not choose the analysis by it.";

    private const string MissingValues =
        "A set without both values is left out for that endpoint; this is fair only where values are missing for reasons unrelated to them.";

    /// <summary>The cautions for a study, in the order in which they are printed.</summary>
    /// <param name="study">The study.</param>
    /// <param name="arrangement">Who stands where.</param>
    /// <param name="someValuesMissing">True where some set was left out for a missing value.</param>
    public static IReadOnlyList<string> For(StudyDefinition study, Arrangement arrangement, bool someValuesMissing)
    {
        var cautions = new List<string> { Screen };
        cautions.Add(study.Design.Kind switch
        {
            DesignKind.ChangeByArm => Arms,
            DesignKind.Crossover => CarryOver,
            _ => SamePerson(study.Design) ? BeforeAfter : Confounding,
        });
        bool isSets = study.Design.Kind == DesignKind.Sets;
        if (isSets)
            cautions.AddRange([MatchedSets, MatchedOn, AfterTheFact]);
        if (arrangement.PeopleInSeveralSets > 0)
            cautions.Add(ReusedControls);
        if (someValuesMissing)
            cautions.Add(isSets ? MembersMissing : MissingValues);
        return cautions;
    }

    private static bool SamePerson(DesignSection design) =>
        design.Kind == DesignKind.Visits || (design.Kind == DesignKind.Pairs && design.Subject is not null && design.Subject == design.Set);
}
