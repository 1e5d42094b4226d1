namespace MatchedSuite.Statistics.Visits;

/// <summary>Finds the variance ratio with the largest restricted likelihood.</summary>
/// <remarks>
/// Newton's steps in x = ln(1 + m̄λ), m̄ the mean number of observations a subject: for balanced data the deviance is convex
/// in x and the start, the ratio from mean squares, is the answer. Steps are kept inside a bracket of the score's root.
/// </remarks>
internal static class RandomInterceptOptimum
{
    // Newton converges quadratically: after a step this small the next one is below rounding.
    private const double LastStep = 1e-8;

    // A step this small changes nothing a double can show, so the evaluation before it stands.
    private const double NoStep = 1e-14;
    private const int MostSteps = 200;

    // Beyond this ratio the subjects explain all but rounding.
    private const double LargestLogarithm = 60;

    // The likelihood may have a peak inside although it falls at zero: these places are looked at.
    private static readonly double[] Places = [0.05, 0.2, 0.5, 1, 2, 4];

    /// <summary>Leaves <paramref name="profile"/> evaluated at the optimum.</summary>
    /// <param name="profile">Evaluated at ratio 0.</param>
    /// <param name="observations">Observations.</param>
    /// <param name="subjects">Subjects with observations.</param>
    /// <param name="within">Residual sum of squares within subjects.</param>
    /// <param name="withinDegrees">Its degrees of freedom, at least 1.</param>
    /// <param name="betweenDegrees">Degrees of freedom left between subjects, at least 1.</param>
    public static void Find(
        ref RandomInterceptProfile profile, int observations, int subjects, double within, int withinDegrees, int betweenDegrees)
    {
        double size = (double)observations / subjects;
        double start = StartingRatio(profile, observations, within / withinDegrees, betweenDegrees, within);
        double atZero = profile.Deviance;
        bool fallsAtZero = profile.Score < 0;
        if (!fallsAtZero)
        {
            double better = BetterPlace(ref profile, size, atZero);
            if (better == 0)
            {
                profile.Evaluate(0);
                return;
            }

            start = better;
        }

        Climb(ref profile, size, Math.Log(1 + size * start));
        if (!fallsAtZero && profile.Deviance >= atZero)
            profile.Evaluate(0);
    }

    // Equates the sum of squares between subjects with its expectation; K = N − tr(A⁻¹ΣS) is the coefficient of λ.
    private static double StartingRatio(
        in RandomInterceptProfile atZero, int observations, double meanSquare, int betweenDegrees, double within)
    {
        double coefficient = atZero.LogDeterminantsSlope;
        double ratio = ((atZero.Residuals - within) / meanSquare - betweenDegrees) / coefficient;
        return ratio > 0 && double.IsFinite(ratio) ? ratio : 1.0 / observations;
    }

    private static double BetterPlace(ref RandomInterceptProfile profile, double size, double atZero)
    {
        double best = atZero, place = 0;
        foreach (double x in Places)
        {
            double ratio = Math.Exp(x) / size - 1 / size;
            profile.Evaluate(ratio);
            if (profile.Deviance < best)
                (best, place) = (profile.Deviance, ratio);
        }

        return place;
    }

    private static void Climb(ref RandomInterceptProfile profile, double size, double x)
    {
        double low = 0, high = LargestLogarithm;
        for (int step = 0; step < MostSteps; step++)
        {
            profile.Evaluate((Math.Exp(x) - 1) / size);
            double change = Math.Exp(x) / size;
            double score = profile.Score * change;
            double curvature = profile.Curvature * change * change + score;
            if (score < 0)
                low = x;
            else
                high = x;

            double next = curvature > 0 ? x - score / curvature : double.NaN;
            if (!(next > low && next < high))
                next = Math.Abs(next - x) <= NoStep ? x : (low + high) / 2;
            double moved = Math.Abs(next - x);
            if (moved <= NoStep)
                return;
            x = next;
            if (moved <= LastStep)
                break;
        }

        profile.Evaluate((Math.Exp(x) - 1) / size);
    }
}
