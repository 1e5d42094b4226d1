namespace MatchedSuite.Statistics.Sets;

/// <summary>The end of a profile-likelihood interval: where the log-likelihood, maximised over the other coefficients, has fallen to a level.</summary>
/// <remarks>
/// Newton's method on the profile, whose slope is the gradient's entry for the exposure. The profile is concave: from a point
/// below the level the iterates approach the limit from outside without passing it; from a point above it the next lies outside, but
/// is taken no more than ten times as far out. A profile that stays above the level however far out has no limit on this side.
/// </remarks>
internal static class ProfileLimit
{
    private const int MostSteps = 200;
    private const double RelativeStep = 1e-10;

    // Where the other coefficients run off without end, the log-likelihood is known to about this.
    private const double LevelTolerance = 1e-9;
    private const double FurtherOut = 10;
    private const double Far = 1e3;

    /// <summary>Finds the limit on one side of the maximum; infinite where the profile never falls to the level, NaN where it is not found.</summary>
    /// <param name="likelihood">The likelihood.</param>
    /// <param name="point">Any point; left at the limit.</param>
    /// <param name="others">Columns to maximise over.</param>
    /// <param name="exposure">Column whose limit is sought.</param>
    /// <param name="level">Log-likelihood at the limit.</param>
    /// <param name="from">The maximum, or any value between it and the limit, or 0 where the maximum lies at infinity.</param>
    /// <param name="reach">Where to look first, counted from there; its sign is the side.</param>
    public static double Find(
        in ConditionalLikelihood likelihood,
        ref ConditionalMaximum point,
        ReadOnlySpan<int> others,
        int exposure,
        double level,
        double from,
        double reach)
    {
        double distance = reach;
        Ascent ascent = Ascent.Endless;
        for (int count = 0; count < MostSteps; count++)
        {
            // Coefficients that have run off would start the next climb where every set is decided and no step can be told.
            if (ascent == Ascent.Endless)
                point.Beta.Clear();
            point.Beta[exposure] = from + distance;
            point.Evaluate(likelihood);
            ascent = point.Climb(likelihood, others);
            if (ascent == Ascent.Lost)
                return double.NaN;
            double above = point.LogLikelihood - level;
            double step = -above / point.Gradient[exposure];
            if (Math.Abs(above) <= LevelTolerance && Math.Abs(step) <= LevelTolerance * Math.Abs(reach))
                return from + distance + step;
            if (above > 0)
            {
                double farthest = FurtherOut * Math.Max(Math.Abs(distance), Math.Abs(reach));
                bool outwards = step * reach > 0 && Math.Abs(step) < farthest;
                step = outwards ? step : Math.CopySign(farthest, reach);
            }

            if (Math.Abs(step) <= RelativeStep * Math.Abs(from + distance))
                return from + distance;
            distance += step;
            if (above > 0 && Math.Abs(distance) > Far * Math.Abs(reach))
                return Math.CopySign(double.PositiveInfinity, reach);
        }

        return double.NaN;
    }
}
