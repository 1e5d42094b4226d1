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

    // Coefficients of the coded columns, the endpoint's origin taken off the first: contrasts lose nothing to a common level.
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
    public double Covariance(int first, int second) => Moments.Scale * Moments.Scale * ScaledWithin * Unscaled(first, second);

    /// <summary>Standard error of a fixed effect.</summary>
    public double StandardError(int place) => Moments.Scale * Math.Sqrt(ScaledWithin * Unscaled(place, place));

    // A sum of weights this small beside their sizes is 0 but for rounding, and the common level drops out.
    private const double NoLevel = 1e-14;

    /// <summary>Turns weights of the leading <see cref="Coefficients"/> into those of the coded columns: constant, indicators, measured.</summary>
    internal void Encode(ReadOnlySpan<double> weights, Span<double> coded)
    {
        coded.Clear();
        weights.CopyTo(coded);
        double level = 0, sizes = 0;
        for (int i = 0; i < Math.Min(weights.Length, Moments.Groups); i++)
        {
            level += weights[i];
            sizes += Math.Abs(weights[i]);
        }

        coded[0] = Math.Abs(level) <= NoLevel * sizes ? 0 : level;
    }

    /// <summary>Σ weights · coefficients of the coded columns.</summary>
    internal double Estimate(ReadOnlySpan<double> coded)
    {
        double sum = 0;
        for (int i = 0; i < coded.Length; i++)
            sum += coded[i] * Relative[i];
        return sum + coded[0] * Moments.Origin;
    }

    // A level is the constant's coefficient plus, but for the first, its indicator's.
    private double Unscaled(int first, int second)
    {
        bool isSumFirst = first > 0 && first < Moments.Groups, isSumSecond = second > 0 && second < Moments.Groups;
        return Inverse[PackedSymmetric.At(first, second)]
            + (isSumFirst ? Inverse[PackedSymmetric.At(0, second)] : 0)
            + (isSumSecond ? Inverse[PackedSymmetric.At(first, 0)] : 0)
            + (isSumFirst && isSumSecond ? Inverse[0] : 0);
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
