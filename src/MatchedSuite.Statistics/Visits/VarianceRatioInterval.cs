using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Exact interval of the variance ratio, and of the intraclass correlation, in a random-intercept model.</summary>
/// <remarks>
/// At the true ratio λ, RSS(λ) − SSE and SSE (the residual squares with subjects fixed) are independent multiples of χ², so
/// ((RSS(λ) − SSE)/r)/(SSE/f) follows F(r, f) also where visits are missing and covariates are there. It falls with λ; the
/// interval holds the λ ≥ 0 between its quantiles. For complete visits it is Shrout &amp; Fleiss's interval of ICC(3,1).
/// Sources: Wald (1947), Annals of Mathematical Statistics 18, 586-589; Harville &amp; Fenech (1985), Biometrics 41, 137-152.
/// </remarks>
public static class VarianceRatioInterval
{
    private const int MostSteps = 500;
    private const double Precision = 1e-15;

    /// <summary>The interval of variance between over variance within; none where the model was not fitted.</summary>
    /// <param name="fit">A fit.</param>
    /// <param name="confidence">Coverage, strictly between 0 and 1.</param>
    /// <param name="scratch">Working memory.</param>
    public static Interval Of(in MixedModelFit fit, double confidence, Scratch scratch)
    {
        Require.OpenUnitInterval(confidence);
        if (fit.Outcome != Outcome.Tested)
            return Interval.None;
        using var frame = scratch.Open();
        Span<double> smallestPivots = frame.Doubles(fit.Moments.Parameters + 1);
        smallestPivots.Clear();
        var profile = new RandomInterceptProfile(fit.Moments, smallestPivots, frame);
        double tail = (1 - confidence) / 2;
        return new Interval(
            Solve(ref profile, fit, FisherF.UpperQuantile(tail, fit.BetweenDegrees, fit.WithinDegrees)),
            Solve(ref profile, fit, FisherF.UpperQuantile(1 - tail, fit.BetweenDegrees, fit.WithinDegrees)));
    }

    /// <summary>The interval of the intraclass correlation, λ/(1 + λ).</summary>
    public static Interval OfIntraclassCorrelation(in MixedModelFit fit, double confidence, Scratch scratch)
    {
        var ratio = Of(fit, confidence, scratch);
        return new Interval(ratio.Low / (1 + ratio.Low), ratio.High / (1 + ratio.High));
    }

    // RSS is convex and falls, so Newton's steps from 0 never pass the root.
    private static double Solve(ref RandomInterceptProfile profile, in MixedModelFit fit, double quantile)
    {
        double target = fit.ScaledWithinSquares * (1 + quantile * fit.BetweenDegrees / fit.WithinDegrees);
        double ratio = 0;
        for (int step = 0; step < MostSteps; step++)
        {
            profile.EvaluateResiduals(ratio);
            double move = (target - profile.Residuals) / profile.ResidualsSlope;
            if (!(move > Precision * ratio))
                return ratio;
            ratio += move;
        }

        return ratio;
    }
}
