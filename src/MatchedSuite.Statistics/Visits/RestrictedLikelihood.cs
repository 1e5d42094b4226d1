using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Fits a random-intercept model to one endpoint by restricted maximum likelihood.</summary>
internal static class RestrictedLikelihood
{
    // A column whose part free of the columns before it is this small beside itself cannot be told from them.
    private const double DependentRatio = 1e-10;

    /// <summary>The fit, or why there is none.</summary>
    public static MixedModelFit Maximise(in VisitSample sample, VisitTerm term, in Scratch.Frame frame)
    {
        var moments = RandomInterceptMoments.Of(sample, term, frame);
        int parameters = moments.Parameters, order = parameters + 1, packed = PackedSymmetric.Length(order);
        if (moments.Subjects < 2 || moments.Observations <= parameters || moments.FewestInGroup == 0)
            return MixedModelFit.Untested(Outcome.TooFewSets, moments.Subjects, moments.Observations);

        Span<double> total = frame.Doubles(packed), factor = frame.Doubles(packed), smallestPivots = frame.Doubles(order);
        Total(moments, total);
        for (int column = 0; column < parameters; column++)
            smallestPivots[column] = DependentRatio * total[PackedSymmetric.At(column, column)];
        smallestPivots[parameters] = 0;
        if (Rank(total, order, smallestPivots, factor) < parameters)
            return MixedModelFit.Untested(Outcome.Collinear, moments.Subjects, moments.Observations);

        int rankWithin = Rank(moments.Within, order, smallestPivots, factor);
        double within = factor[^1] * factor[^1];
        int withinDegrees = moments.Observations - moments.Subjects - rankWithin;
        int betweenDegrees = moments.Subjects - (parameters - rankWithin);
        if (withinDegrees < 1 || betweenDegrees < 1)
            return MixedModelFit.Untested(Outcome.TooFewSets, moments.Subjects, moments.Observations);
        // Rounding is left by the values themselves, and by taking from their squares what covariates explain.
        double rounding = StudentTest.RoundingOf(moments.LargestMagnitude) / moments.Scale;
        double explained = StudentTest.RoundingOf(moments.Within[^1]);
        if (within <= withinDegrees * rounding * rounding + explained)
            return MixedModelFit.Untested(Outcome.NoVariation, moments.Subjects, moments.Observations);

        smallestPivots.Clear();
        var profile = new RandomInterceptProfile(moments, smallestPivots, frame);
        profile.Evaluate(0);
        RandomInterceptOptimum.Find(ref profile, moments.Observations, moments.Subjects, within, withinDegrees, betweenDegrees);
        return Describe(sample, term, moments, profile, frame) with
        {
            ScaledWithinSquares = within,
            WithinDegrees = withinDegrees,
            BetweenDegrees = betweenDegrees,
        };
    }

    // Cross-products of all observations, as if there were no subjects.
    private static void Total(in RandomInterceptMoments moments, Span<double> total)
    {
        moments.Within.CopyTo(total);
        for (int size = 1; size <= moments.SubjectsBySize.Length; size++)
        {
            if (moments.SubjectsBySize[size - 1] == 0)
                continue;
            var between = moments.BetweenOf(size);
            for (int at = 0; at < total.Length; at++)
                total[at] += between[at] / size;
        }
    }

    // Independent columns among the fixed effects; the endpoint's own column, the last, does not count.
    private static int Rank(ReadOnlySpan<double> matrix, int order, ReadOnlySpan<double> smallestPivots, Span<double> factor)
    {
        int rank = Cholesky.Factor(matrix, order, smallestPivots, factor);
        return factor[^1] > 0 ? rank - 1 : rank;
    }

    private static MixedModelFit Describe(
        in VisitSample sample, VisitTerm term, scoped in RandomInterceptMoments moments, scoped in RandomInterceptProfile profile, in Scratch.Frame frame)
    {
        int parameters = moments.Parameters, free = profile.DegreesOfFreedom;
        double ratio = profile.Ratio, within = profile.Residuals / free;
        Span<double> relative = frame.Doubles(parameters), coefficients = frame.Doubles(parameters);
        for (int i = 0; i < parameters; i++)
        {
            relative[i] = (i < moments.Groups ? moments.Levels[i] : 0) - moments.Scale * profile.Residual[i];
            bool isLevel = i > 0 && i < moments.Groups;
            coefficients[i] = relative[i] + (isLevel ? coefficients[0] : i == 0 ? moments.Origin : 0);
        }

        // Observed information of −2·log-likelihood in (σ², λ); at the bound λ is no free parameter.
        double byWithin = free / (within * within), byBoth = -profile.ResidualsSlope / (within * within);
        double byRatio = profile.LogDeterminantsCurvature + profile.ResidualsCurvature / within;
        double determinant = byWithin * byRatio - byBoth * byBoth;
        return new MixedModelFit
        {
            Outcome = Outcome.Tested,
            Remarks = ratio == 0 ? Remarks.SingularFit : Remarks.None,
            Term = term,
            Times = sample.Times,
            Subjects = moments.Subjects,
            Observations = moments.Observations,
            Coefficients = coefficients,
            Relative = relative,
            ColumnMeans = moments.Centres,
            ScaledWithin = within,
            VarianceRatio = ratio,
            RestrictedLogLikelihood = -0.5 * (free * (Math.Log(2 * Math.PI * within) + 1) + profile.LogDeterminants) - free * Math.Log(moments.Scale),
            Score = ratio * profile.Score,
            Moments = moments,
            Inverse = profile.Inverse,
            CrossProductsSlope = profile.CrossProductsSlope,
            VarianceOfWithin = ratio == 0 ? 2 / byWithin : 2 * byRatio / determinant,
            VarianceOfRatio = ratio == 0 ? 0 : 2 * byWithin / determinant,
            CovarianceOfBoth = ratio == 0 ? 0 : -2 * byBoth / determinant,
        };
    }
}
