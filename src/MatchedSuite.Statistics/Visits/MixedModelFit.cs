using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>What a random-intercept model found on one endpoint. Numbers are NaN, spans empty, unless <see cref="Outcome"/> is Tested.</summary>
/// <remarks>Lives in the frame that it was fitted in.</remarks>
public readonly ref struct MixedModelFit
{
    /// <summary>Whether the model could be fitted.</summary>
    public Outcome Outcome { get; internal init; }

    /// <summary>Remarks for the reader: a variance at its bound, too few subjects.</summary>
    public Remarks Remarks { get; internal init; }

    /// <summary>How the course over the visits is described.</summary>
    public VisitTerm Term { get; internal init; }

    /// <summary>Times of the visits.</summary>
    public ReadOnlySpan<double> Times { get; internal init; }

    /// <summary>Subjects with at least one observation.</summary>
    public int Subjects { get; internal init; }

    /// <summary>Observations that entered the model.</summary>
    public int Observations { get; internal init; }

    /// <summary>
    /// Fixed effects. <see cref="VisitTerm.Means"/>: the mean of each visit where every covariate stands at its mean;
    /// <see cref="VisitTerm.Line"/>: the level at the mean time and covariates, then the slope. Then one slope a covariate.
    /// </summary>
    public ReadOnlySpan<double> Coefficients { get; internal init; }

    /// <summary>The means over the observations of the measured columns (time of a line, covariates) that levels refer to.</summary>
    public ReadOnlySpan<double> ColumnMeans { get; internal init; }

    /// <summary>Variance within subjects, squared endpoint unit.</summary>
    public double VarianceWithin => ScaledWithin * Moments.Scale * Moments.Scale;

    /// <summary>Variance between subjects, squared endpoint unit; 0 at the bound.</summary>
    public double VarianceBetween => VarianceRatio * VarianceWithin;

    /// <summary>Variance between over variance within.</summary>
    public double VarianceRatio { get; internal init; }

    /// <summary>Share of the variance that lies between subjects.</summary>
    public double IntraclassCorrelation => VarianceRatio / (1 + VarianceRatio);

    /// <summary>Restricted log-likelihood at its maximum, constant included.</summary>
    public double RestrictedLogLikelihood { get; internal init; }

    /// <summary>Slope of the profile deviance in the logarithm of the variance ratio: 0 up to rounding at a peak inside.</summary>
    public double Score { get; internal init; }

    /// <summary>Degrees of freedom of the residual sum of squares with subjects as fixed effects.</summary>
    public int WithinDegrees { get; internal init; }

    /// <summary>Degrees of freedom between subjects beside the fixed effects.</summary>
    public int BetweenDegrees { get; internal init; }

    // Coefficients with the endpoint's origin taken off the levels: contrasts of them lose nothing to a common level.
    internal ReadOnlySpan<double> Relative { get; init; }

    internal RandomInterceptMoments Moments { get; init; }

    // Variance within subjects, and residual squares with subjects as fixed effects, in squared units of Moments.Scale.
    internal double ScaledWithin { get; init; }

    internal double ScaledWithinSquares { get; init; }

    internal ReadOnlySpan<double> Inverse { get; init; }

    internal ReadOnlySpan<double> CrossProductsSlope { get; init; }

    // Covariance of the estimates of (scaled variance within, variance ratio), from the observed information.
    internal double VarianceOfWithin { get; init; }

    internal double VarianceOfRatio { get; init; }

    internal double CovarianceOfBoth { get; init; }

    /// <summary>Covariance of two fixed effects, by their places in <see cref="Coefficients"/>.</summary>
    public double Covariance(int first, int second) => VarianceWithin * Inverse[PackedSymmetric.At(first, second)];

    /// <summary>Standard error of a fixed effect.</summary>
    public double StandardError(int place) => Moments.Scale * Math.Sqrt(ScaledWithin * Inverse[PackedSymmetric.At(place, place)]);

    // A sum of weights this small beside their sizes is 0 but for rounding, and the origin drops out.
    private const double NoLevel = 1e-14;

    /// <summary>Σ weights · coefficients over the leading coefficients.</summary>
    internal double Combine(ReadOnlySpan<double> weights)
    {
        double sum = 0, level = 0, sizes = 0;
        for (int i = 0; i < weights.Length; i++)
        {
            sum += weights[i] * Relative[i];
            if (i >= Moments.Groups)
                continue;
            level += weights[i];
            sizes += Math.Abs(weights[i]);
        }

        return Math.Abs(level) <= NoLevel * sizes ? sum : sum + level * Moments.Origin;
    }

    internal static MixedModelFit Untested(Outcome outcome, int subjects, int observations) => new()
    {
        Outcome = outcome,
        Subjects = subjects,
        Observations = observations,
        ScaledWithin = double.NaN,
        VarianceRatio = double.NaN,
        RestrictedLogLikelihood = double.NaN,
        Score = double.NaN,
        Remarks = TestResult.Untested(outcome, subjects, observations).Remarks,
    };
}
