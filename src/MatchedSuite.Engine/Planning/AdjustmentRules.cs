using MatchedSuite.Engine.Methods;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Planning;

/// <summary>Which adjustments, families, methods and intervals of a study go together; the rest is refused before a value is read.</summary>
internal static class AdjustmentRules
{
    /// <summary>Refuses a combination that has no meaning.</summary>
    /// <exception cref="RefusalException">Names the key of the study file.</exception>
    public static void Check(StudyDefinition study, EndpointCatalogue catalogue)
    {
        Adjustment[] asked = [.. study.Analysis.Adjust.Select(AdjustmentTable.Named)];
        foreach (Adjustment adjustment in asked)
        {
            if (adjustment is ResamplingAdjustment resampling)
                RefuseUnlikeTheDesign(study, catalogue, resampling);
            if (adjustment is PValueAdjustment byP)
                RefuseFamilyRule(study, byP);
        }

        if (study.Analysis.Intervals.Contains(IntervalKind.Fcr))
            RefuseCoverage(study, asked);
    }

    /// <summary>What flipped endpoints are compared by; null where no adjustment flips sets or exchanges labels.</summary>
    public static FlipStatistic? StatisticOf(StudyDefinition study, EndpointCatalogue catalogue)
    {
        if (!study.Analysis.Adjust.Any(name => AdjustmentTable.Named(name) is ResamplingAdjustment))
            return null;
        return PrimaryMethods(study, catalogue).All(of => DesignTable.Of(study).FlipOf(of.Method)?.Statistic == FlipStatistic.Score)
            ? FlipStatistic.Score
            : FlipStatistic.T;
    }

    private static void RefuseUnlikeTheDesign(StudyDefinition study, EndpointCatalogue catalogue, ResamplingAdjustment adjustment)
    {
        DesignEntry design = DesignTable.Of(study);
        if (Enum.GetValues<EndpointKind>().SelectMany(design.MethodsFor).Any(design.Relabels))
            RefuseUnrelabelable(study, adjustment);
        else
            RefuseUnflippable(study, catalogue, adjustment.Name);
    }

    // Labels are exchanged over values as they are. At arms no method is adjusted for covariates, and the results say so.
    private static void RefuseUnrelabelable(StudyDefinition study, ResamplingAdjustment adjustment)
    {
        if (adjustment.OverLabels is null)
        {
            string[] able = [.. AdjustmentTable.All.OfType<ResamplingAdjustment>().Where(other => other.OverLabels is not null).Select(other => other.Name)];
            throw Refusal(study, "analysis.adjust",
                $"'{adjustment.Name}' flips signs, and a design of kind '{WrittenName.Of(study.Design.Kind)}' exchanges labels instead",
                $"{Listing.Of(able)}, or an adjustment of p-values", $"Ask for {able[0]}, or for holm.");
        }

        if (study.Design.Kind == DesignKind.Sets && study.Design.Covariates.Count > 0)
        {
            throw Refusal(study, "analysis.adjust", $"'{adjustment.Name}' exchanges labels over values as they are, and design.covariates asks for adjusted results",
                "a study without covariates, or adjustments of p-values alone", "Ask for holm, or another adjustment of p-values.");
        }
    }

    private static void RefuseUnflippable(StudyDefinition study, EndpointCatalogue catalogue, string adjustment)
    {
        DesignEntry design = DesignTable.Of(study);
        string[] able = [.. Enum.GetValues<EndpointKind>().SelectMany(design.MethodsFor).Distinct().Where(name => design.FlipOf(name) is not null)];
        if (able.Length == 0)
        {
            throw Refusal(study, "analysis.adjust", $"'{adjustment}' flips whole sets, which no method for a design of kind '{WrittenName.Of(design.Kind)}' does",
                "an adjustment of p-values", "Ask for holm, or another adjustment of p-values.");
        }

        foreach (var (kind, method) in PrimaryMethods(study, catalogue))
        {
            if (design.FlipOf(method) is { } rule)
                RefuseUnlikeTheMethod(study, adjustment, method, rule);
            if (design.FlipOf(method) is null)
            {
                throw Refusal(study, "analysis.adjust",
                    $"'{adjustment}' flips whole sets over all endpoints, and '{method}', the primary method of {WrittenName.Of(kind)} endpoints, has no place in that",
                    $"a first method among {Listing.Of(able)} for every kind of endpoint that endpoints.kind or the dictionary names",
                    $"Leave the {WrittenName.Of(kind)} endpoints to a study of their own (endpoints.exclude), or ask for another adjustment.");
            }
        }

        if (study.Analysis.AcrossContrasts)
        {
            throw Refusal(study, "analysis.across", $"'{adjustment}' flips the sets of one contrast at a time", "'none', or adjustments of p-values alone",
                "Remove the key, or ask for another adjustment.");
        }
    }

    // A flip knows the differences alone, so a method that uses more would be adjusted as if it did not.
    private static void RefuseUnlikeTheMethod(StudyDefinition study, string adjustment, string method, FlipRule rule)
    {
        if (rule.Statistic == FlipStatistic.T && study.Design.Covariates.Count > 0)
        {
            throw Refusal(study, "analysis.adjust", $"'{adjustment}' flips differences as they are, and '{method}' is adjusted for design.covariates",
                "a study without covariates, or adjustments of p-values alone", "Ask for holm, or another adjustment of p-values.");
        }

        if (rule.Statistic == FlipStatistic.Score && study.Analysis.Zeros == ZeroRule.Pratt)
        {
            throw Refusal(study, "analysis.adjust", $"'{adjustment}' ranks differences without zeros, and analysis.zeros is 'pratt'",
                "'drop' with this adjustment", "Remove analysis.zeros, or ask for another adjustment.");
        }
    }

    private static void RefuseFamilyRule(StudyDefinition study, PValueAdjustment adjustment)
    {
        FamilyRule rule = study.Analysis.Family;
        if (rule == FamilyRule.ByFamily && adjustment.GoesFromFamilyToFamily)
        {
            throw Refusal(study, "analysis.family", $"'{adjustment.Name}' goes from family to family, and 'by-family' adjusts each family as if there were no other",
                "'all' with this adjustment", "Set analysis.family to 'all'.");
        }

        if (rule == FamilyRule.ByFamilyThenAll && adjustment.Controls == ErrorRate.FalseDiscovery && adjustment.OverSelectedFamilies is null)
        {
            string[] able = [.. AdjustmentTable.OverPValues.Where(other => other.OverSelectedFamilies is not null).Select(other => other.Name)];
            throw Refusal(study, "analysis.family", $"'{adjustment.Name}' is not worked out for families that are selected first",
                $"of the adjustments for the false discovery rate {Listing.Of(able)} alone", "Set analysis.family to 'all' or 'by-family', or change analysis.adjust.");
        }
    }

    private static void RefuseCoverage(StudyDefinition study, Adjustment[] asked)
    {
        if (!Array.Exists(asked, adjustment => adjustment.Controls == ErrorRate.FalseDiscovery))
        {
            throw Refusal(study, "analysis.intervals", "'fcr' is for the discoveries of an adjustment for the false discovery rate, and none is asked for",
                "such an adjustment in analysis.adjust", "Add bh to analysis.adjust, or ask for 'simultaneous' intervals.");
        }

        if (study.Analysis.Family == FamilyRule.ByFamilyThenAll)
        {
            throw Refusal(study, "analysis.intervals", "'fcr' intervals have no guarantee where families are selected first",
                "analysis.family 'all' or 'by-family' with them", "Change analysis.family, or ask for 'simultaneous' intervals.");
        }
    }

    private static IEnumerable<(EndpointKind Kind, string Method)> PrimaryMethods(StudyDefinition study, EndpointCatalogue catalogue) =>
        catalogue.Kinds.Where(study.Analysis.Methods.ContainsKey).Order().SelectMany(kind => PrimaryMethods(study, kind).Select(method => (kind, method)));

    // Each comparison of visits has a primary method of its own.
    private static IEnumerable<string> PrimaryMethods(StudyDefinition study, EndpointKind kind) =>
        study.Design.Kind == DesignKind.Visits ? VisitComparisons.PrimaryMethods(study, kind) : [study.Analysis.Methods[kind][0]];

    private static RefusalException Refusal(StudyDefinition study, string key, string found, string expected, string remedy) =>
        new($"{Path.GetFileName(study.Path)}, key '{key}'", found, expected, remedy);
}
