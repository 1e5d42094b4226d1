namespace MatchedSuite.Statistics.Sets;

/// <summary>The end of a profile-likelihood interval: where the log-likelihood, maximised over the other coefficients, has fallen to a level.</summary>
/// <remarks>
/// Newton's method on the profile, whose slope is the gradient's entry for the exposure. The profile is concave: from a point
/// below the level the iterates approach the limit from outside without passing it, from a point above the first one lands below.
/// </remarks>
internal static class ProfileLimit
{
    private const int MostSteps = 200;
    private const double RelativeStep = 1e-10;

    /// <summary>Finds the limit on the side of the maximum on which <paramref name="start"/> lies; NaN where it cannot.</summary>
    /// <param name="likelihood">The likelihood.</param>
    /// <param name="point">Any point; left at the limit.</param>
    /// <param name="others">Columns to maximise over.</param>
    /// <param name="exposure">Column whose limit is sought.</param>
    /// <param name="level">Log-likelihood at the limit.</param>
    /// <param name="start">Where to begin, not at the maximum itself.</param>
    public static double Find(
        in ConditionalLikelihood likelihood,
        ref ConditionalMaximum point,
        ReadOnlySpan<int> others,
        int exposure,
        double level,
        double start)
    {
        double at = start;
        for (int count = 0; count < MostSteps; count++)
        {
            point.Beta[exposure] = at;
            point.Evaluate(likelihood);
            if (!others.IsEmpty && point.Climb(likelihood, others) == Ascent.Lost)
                return double.NaN;
            double step = (level - point.LogLikelihood) / point.Gradient[exposure];
            at += step;
            if (Math.Abs(step) <= RelativeStep * Math.Abs(at))
                return at;
        }

        return double.NaN;
    }
}
