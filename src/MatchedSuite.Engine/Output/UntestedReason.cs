using System.Globalization;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>Why an endpoint was not tested, in words for a reader of <c>audit/untested.csv</c>.</summary>
public static class UntestedReason
{
    /// <summary>The reason behind an outcome.</summary>
    public static string Of(Outcome outcome, StudyDefinition study) => outcome switch
    {
        Outcome.TooFewSets => string.Create(
            CultureInfo.InvariantCulture, $"fewer complete sets than the method or analysis.minimum-sets ({study.Analysis.MinimumSets}) needs"),
        Outcome.TooManyMissing => string.Create(
            CultureInfo.InvariantCulture, $"a larger share of sets lacks a value than gates.missing-at-most ({study.Gates.MissingAtMost:P0}) allows"),
        Outcome.NoVariation => "every difference is the same, so there is no spread to judge its mean by",
        Outcome.NothingDiffers => "no set differs between the roles, so nothing points in a direction",
        Outcome.NoReferenceSpread => "the values of the reference role do not vary, so their standard deviation is no unit (endpoints.scale: sd)",
        Outcome.Collinear => "the covariates determine the endpoint or the comparison within every set",
        Outcome.NotConverged => "the likelihood could not be maximised to the accuracy that is promised",
        Outcome.TooFewEndpoints => "the family has too few endpoints to learn a common variance from",
        Outcome.TooManyCategories => "the endpoint has more than 100 distinct codes; give it the kind 'continuous'",
        _ => throw new ArgumentOutOfRangeException(nameof(outcome), outcome, "A tested row has no reason not to be."),
    };
}
