namespace MatchedSuite.Statistics;

/// <summary>What one method found on one endpoint. Numbers that a method does not define are NaN.</summary>
public readonly record struct TestResult()
{
    /// <summary>Whether the method could be computed.</summary>
    public Outcome Outcome { get; init; } = Outcome.Tested;

    /// <summary>Sets (pairs, subjects) that entered the method.</summary>
    public int Sets { get; init; }

    /// <summary>Samples that entered the method.</summary>
    public int Samples { get; init; }

    /// <summary>Point estimate on the analysis scale: endpoint units after the transform, log odds or log rate for ratio methods.</summary>
    public double Estimate { get; init; } = double.NaN;

    /// <summary>Standard error of the estimate, same scale.</summary>
    public double StandardError { get; init; } = double.NaN;

    /// <summary>Confidence interval of the estimate, same scale.</summary>
    public Interval Interval { get; init; } = Interval.None;

    /// <summary>Test statistic; what it is stands with each method.</summary>
    public double Statistic { get; init; } = double.NaN;

    /// <summary>Degrees of freedom (numerator ones for F).</summary>
    public double DegreesOfFreedom { get; init; } = double.NaN;

    /// <summary>Denominator degrees of freedom of an F statistic.</summary>
    public double DenominatorDegreesOfFreedom { get; init; } = double.NaN;

    /// <summary>p-value for the alternative asked for, not adjusted.</summary>
    public Probability P { get; init; } = Probability.Missing;

    /// <summary>Standardised effect, without unit.</summary>
    public double EffectSize { get; init; } = double.NaN;

    /// <summary>Smallest p-value that this many sets could have given, whatever the values; missing where there is no such floor.</summary>
    public Probability SmallestPossibleP { get; init; } = Probability.Missing;

    /// <summary>Remarks for the reader.</summary>
    public Remarks Remarks { get; init; }

    /// <summary>A result without a test: the counts and the reason.</summary>
    public static TestResult Untested(Outcome outcome, int sets, int samples, Remarks remarks = Remarks.None) =>
        new() { Outcome = outcome, Sets = sets, Samples = samples, Remarks = remarks | RemarkOf(outcome) };

    private static Remarks RemarkOf(Outcome outcome) => outcome switch
    {
        Outcome.TooFewSets => Remarks.TooFewSets,
        Outcome.NoVariation => Remarks.NoVariation,
        Outcome.NothingDiffers => Remarks.NothingDiffers,
        Outcome.TooManyMissing => Remarks.TooManyMissing,
        Outcome.Collinear => Remarks.Collinear,
        Outcome.NotConverged => Remarks.NotConverged,
        Outcome.TooFewEndpoints => Remarks.TooFewEndpoints,
        Outcome.TooManyCategories => Remarks.TooManyCategories,
        Outcome.NoReferenceSpread => Remarks.NoReferenceSpread,
        _ => Remarks.None,
    };
}
