namespace MatchedSuite.Study.Definition;

/// <summary>Every method and adjustment a study file may name, whether or not this version can compute it.</summary>
public static class KnownNames
{
    /// <summary>A method and the endpoints and designs it is for.</summary>
    private sealed record Method(string Name, EndpointKind[] Kinds, DesignKind[] Designs);

    private static readonly DesignKind[] PairsAndVisits = [DesignKind.Pairs, DesignKind.Visits];
    private static readonly DesignKind[] PairsVisitsAndArms = [DesignKind.Pairs, DesignKind.Visits, DesignKind.ChangeByArm];
    private static readonly EndpointKind[] Measured = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Signs = [EndpointKind.Binary];
    private static readonly EndpointKind[] Codes = [EndpointKind.Ordinal];
    private static readonly EndpointKind[] Events = [EndpointKind.Count];
    private static readonly EndpointKind[] MeasuredOrCodes = [EndpointKind.Continuous, EndpointKind.Ordinal];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal, EndpointKind.Count];
    private static readonly EndpointKind[] Any = [EndpointKind.Continuous, EndpointKind.Binary, EndpointKind.Ordinal, EndpointKind.Count];

    private static readonly Method[] Catalogue =
    [
        new("paired-t", Measured, PairsVisitsAndArms),
        new("moderated-paired-t", Measured, PairsVisitsAndArms),
        new("signed-rank", MeasuredOrCodes, PairsVisitsAndArms),
        new("sign", MeasuredOrCodes, PairsVisitsAndArms),
        new("sign-flip", Measured, PairsVisitsAndArms),
        new("trimmed-mean", Measured, PairsVisitsAndArms),
        new(WithinPairSlope, Measured, [DesignKind.Pairs]),
        new("mcnemar", Signs, PairsAndVisits),
        new("mcnemar-corrected", Signs, PairsAndVisits),
        new("mcnemar-exact", Signs, PairsAndVisits),
        new("mcnemar-midp", Signs, PairsAndVisits),
        new("stuart-maxwell", Codes, PairsAndVisits),
        new("bowker", Codes, PairsAndVisits),
        new("paired-poisson", Events, PairsVisitsAndArms),
        new(ConditionalLogistic, Any, [DesignKind.Sets, DesignKind.Pairs]),
        new("within-set-linear", Measured, [DesignKind.Sets]),
        new("within-set-robust", Measured, [DesignKind.Sets]),
        new("aligned-rank", Ordered, [DesignKind.Sets]),
        new("set-relabel", Ordered, [DesignKind.Sets]),
        new("mantel-haenszel", Signs, [DesignKind.Sets]),
        new("rm-anova", Measured, [DesignKind.Visits]),
        new("rm-anova-hf", Measured, [DesignKind.Visits]),
        new("rm-anova-raw", Measured, [DesignKind.Visits]),
        new("friedman", Ordered, [DesignKind.Visits]),
        new("mixed-model", Measured, [DesignKind.Visits]),
        new("page-trend", Ordered, [DesignKind.Visits]),
        new("linear-trend", Measured, [DesignKind.Visits]),
        new("cochran-q", Signs, [DesignKind.Visits]),
        new("change-welch", Measured, [DesignKind.ChangeByArm]),
        new("change-ancova", Measured, [DesignKind.ChangeByArm]),
        new("change-rank-sum", Ordered, [DesignKind.ChangeByArm]),
        new("crossover-t", Measured, [DesignKind.Crossover]),
        new("mainland-gart", Signs, [DesignKind.Crossover]),
    ];

    /// <summary>The one method for a measured exposure, and for nothing else.</summary>
    public const string WithinPairSlope = "within-pair-slope";

    /// <summary>The method whose estimate is a log odds ratio per unit of the endpoint, whatever its kind.</summary>
    public const string ConditionalLogistic = "conditional-logistic";

    /// <summary>Names of all methods.</summary>
    public static IReadOnlyList<string> Methods { get; } = [.. Catalogue.Select(method => method.Name)];

    /// <summary>Names of all adjustments.</summary>
    public static IReadOnlyList<string> Adjustments { get; } =
    [
        "bonferroni", "sidak", "holm", "holm-sidak", "hochberg", "hommel", "max-t", "min-p", "bh", "by", "two-stage-bh",
        "storey-q", "weighted-bh", "fixed-sequence", "gatekeeper-holm", "e-bh",
    ];

    /// <summary>Names of the methods for a kind of endpoint in a kind of design.</summary>
    public static IReadOnlyList<string> MethodsFor(DesignKind design, EndpointKind endpoint) =>
        [.. Catalogue.Where(method => method.Designs.Contains(design) && method.Kinds.Contains(endpoint)).Select(method => method.Name)];

    /// <summary>Names of the methods for a kind of endpoint in any design.</summary>
    public static IReadOnlyList<string> MethodsFor(EndpointKind endpoint) =>
        [.. Catalogue.Where(method => method.Kinds.Contains(endpoint)).Select(method => method.Name)];

    /// <summary>The methods taken where a study file names none, the primary one first.</summary>
    public static IReadOnlyList<string> UsualMethods(DesignKind design, EndpointKind endpoint) =>
        (design, endpoint) switch
        {
            (DesignKind.Pairs or DesignKind.Visits, EndpointKind.Continuous) => ["paired-t", "signed-rank"],
            (DesignKind.Pairs or DesignKind.Visits, EndpointKind.Binary) => ["mcnemar-exact"],
            (DesignKind.Pairs or DesignKind.Visits, EndpointKind.Ordinal) => ["signed-rank"],
            (DesignKind.Pairs or DesignKind.Visits, EndpointKind.Count) => ["paired-poisson"],
            (DesignKind.Sets, _) => [ConditionalLogistic],
            (DesignKind.ChangeByArm, EndpointKind.Continuous) => ["change-ancova", "change-welch"],
            (DesignKind.ChangeByArm, EndpointKind.Ordinal or EndpointKind.Count) => ["change-rank-sum"],
            (DesignKind.Crossover, EndpointKind.Continuous) => ["crossover-t"],
            (DesignKind.Crossover, EndpointKind.Binary) => ["mainland-gart"],
            _ => [],
        };

    /// <summary>The method taken for a comparison of all visits where a study file names none for the kind; null where there is none.</summary>
    public static string? UsualMethod(VisitContrast contrast, EndpointKind endpoint) => (contrast, endpoint) switch
    {
        (VisitContrast.Omnibus, EndpointKind.Continuous) => "rm-anova",
        (VisitContrast.Omnibus, EndpointKind.Binary) => "cochran-q",
        (VisitContrast.Omnibus, _) => "friedman",
        (VisitContrast.Trend, EndpointKind.Continuous) => "linear-trend",
        (VisitContrast.Trend, EndpointKind.Ordinal or EndpointKind.Count) => "page-trend",
        _ => null,
    };
}
