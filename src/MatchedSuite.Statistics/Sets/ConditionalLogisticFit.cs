using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Sets;

/// <summary>A conditional logistic model fitted to matched sets. Numbers that are not defined are NaN.</summary>
/// <remarks>
/// The tests without prefix are of the endpoint given the covariates (so with the covariates' effects left free); those named
/// overall are of the endpoint and all covariates together.
/// </remarks>
public readonly record struct ConditionalLogisticFit()
{
    /// <summary>Whether the model could be fitted.</summary>
    public Outcome Outcome { get; init; } = Outcome.Tested;

    /// <summary>Sets with both roles.</summary>
    public int Sets { get; init; }

    /// <summary>Members of those sets.</summary>
    public int Samples { get; init; }

    /// <summary>Log odds ratio per unit of the endpoint; infinite where the endpoint separates the roles; NaN for several columns.</summary>
    public double Estimate { get; init; } = double.NaN;

    /// <summary>Its standard error from the information; NaN where the estimate is infinite.</summary>
    public double StandardError { get; init; } = double.NaN;

    /// <summary>Wald interval at the options' confidence; where the roles are separated, the profile-likelihood interval.</summary>
    public Interval Interval { get; init; } = Interval.None;

    /// <summary>Log-likelihood at the maximum, or its limit where the roles are separated.</summary>
    public double LogLikelihood { get; init; } = double.NaN;

    /// <summary>Log-likelihood of the model with the covariates alone.</summary>
    public double LogLikelihoodOfCovariates { get; init; } = double.NaN;

    /// <summary>Log-likelihood where every coefficient is zero.</summary>
    public double NullLogLikelihood { get; init; } = double.NaN;

    /// <summary>Squared estimate over its variance; several columns jointly.</summary>
    public ChiSquaredTest Wald { get; init; } = ChiSquaredTest.None;

    /// <summary>Twice the rise of the log-likelihood over the covariates alone.</summary>
    public ChiSquaredTest LikelihoodRatio { get; init; } = ChiSquaredTest.None;

    /// <summary>Rao's score test at the maximum of the covariates alone.</summary>
    public ChiSquaredTest Score { get; init; } = ChiSquaredTest.None;

    /// <summary>Wald test of all coefficients.</summary>
    public ChiSquaredTest OverallWald { get; init; } = ChiSquaredTest.None;

    /// <summary>Twice the rise of the log-likelihood over no coefficients at all.</summary>
    public ChiSquaredTest OverallLikelihoodRatio { get; init; } = ChiSquaredTest.None;

    /// <summary>Rao's score test of all coefficients at zero.</summary>
    public ChiSquaredTest OverallScore { get; init; } = ChiSquaredTest.None;

    /// <summary>The first covariate that was left out because the others, or the sets, determine it; −1 where none was.</summary>
    public int CollinearCovariate { get; init; } = -1;

    /// <summary>How often the likelihood was evaluated.</summary>
    public int Evaluations { get; init; }

    /// <summary>Remarks for the reader.</summary>
    public Remarks Remarks { get; init; }

    /// <summary>The endpoint's test: Wald's z, or the signed root of the likelihood ratio where the estimate has no standard error.</summary>
    /// <param name="sides">Direction of the alternative.</param>
    public TestResult Test(Sides sides)
    {
        if (Outcome != Outcome.Tested)
            return TestResult.Untested(Outcome, Sets, Samples, Remarks);
        double z = double.IsNaN(StandardError) ? Math.CopySign(Math.Sqrt(LikelihoodRatio.Statistic), Estimate) : Estimate / StandardError;
        return new TestResult
        {
            Sets = Sets,
            Samples = Samples,
            Estimate = Estimate,
            StandardError = StandardError,
            Interval = Interval,
            Statistic = z,
            P = Tails.ForSides(sides, StandardNormal.LowerTail(z), StandardNormal.UpperTail(z)),
            Remarks = Remarks,
        };
    }
}
