using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Sets;

/// <summary>Exposure columns beside covariates, fitted by conditional likelihood; the exposures are tested given the covariates.</summary>
internal ref struct ConditionalModel
{
    // A column's part in an endless direction, beside the largest part, from which its coefficient counts as infinite.
    private const double PartOfDirection = 1e-4;

    // A standard error this many times the one without covariates says that nothing is known of the coefficient.
    private const double LargestError = 1e4;

    private readonly ConditionalLikelihood _likelihood;
    private readonly Span<int> _free;
    private readonly Span<double> _factor;
    private readonly Span<double> _work;
    private readonly int _covariates;
    private readonly int _columns;
    private readonly int _adjusting;
    private ConditionalMaximum _point;

    /// <summary>Lays the design out and evaluates it where all coefficients are zero.</summary>
    /// <param name="sets">At least one set.</param>
    /// <param name="design">
    /// Columns one after another, covariates before exposures, so that of two that say the same the later is left out.
    /// </param>
    /// <param name="covariates">How many of the columns are covariates.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="frame">Working memory that outlives the model.</param>
    public ConditionalModel(in SetSample sets, ReadOnlySpan<double> design, int covariates, int columns, in Scratch.Frame frame)
    {
        _covariates = covariates;
        _columns = columns;
        _likelihood = ConditionalLikelihood.Of(sets, design, columns, frame);
        _factor = frame.Doubles(columns * columns);
        _work = frame.Doubles(columns);
        _point = new ConditionalMaximum(columns, frame);
        _point.Evaluate(_likelihood);

        Span<int> independent = frame.Integers(columns + 1);
        _free = independent[..Cholesky.Independent(_point.Information, columns, independent, _factor)];
        while (_adjusting < _free.Length && _free[_adjusting] < covariates)
            _adjusting++;
    }

    private readonly int Exposures => _free.Length - _adjusting;

    /// <summary>Climbs to the maximum and tests there.</summary>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="interval">Which interval to report.</param>
    /// <param name="coefficients">Receives one log odds ratio a column; NaN where left out.</param>
    /// <param name="standardErrors">Receives their standard errors; NaN where left out or not finite.</param>
    public ConditionalLogisticFit Fit(
        TestOptions options, ConditionalInterval interval, Span<double> coefficients, Span<double> standardErrors)
    {
        int collinear = FirstLeftOut();
        var fit = new ConditionalLogisticFit
        {
            CollinearCovariate = collinear,
            Remarks = collinear < 0 ? Remarks.None : Remarks.CollinearCovariate,
            NullLogLikelihood = _point.LogLikelihood,
            LogLikelihoodOfCovariates = _point.LogLikelihood,
        };
        if (Exposures == 0)
            return fit with { Outcome = _point.Spreads[_covariates..].ContainsAnyExcept(0) ? Outcome.Collinear : Outcome.NothingDiffers };
        ChiSquaredTest score = Score(_free.Length);
        fit = fit with { Score = score, OverallScore = score };
        if (_adjusting > 0)
        {
            if (_point.Climb(_likelihood, _free[.._adjusting]) == Ascent.Lost)
                return fit with { Outcome = Outcome.NotConverged };
            _point.Evaluate(_likelihood);
            fit = fit with { LogLikelihoodOfCovariates = _point.LogLikelihood, Score = Score(Exposures) };
        }

        Ascent ascent = _point.Climb(_likelihood, _free);
        if (ascent == Ascent.Lost)
            return fit with { Outcome = Outcome.NotConverged };
        double maximum = ascent == Ascent.Endless && _columns == 1 ? _likelihood.LimitAlong(_point.Step[0]) : _point.LogLikelihood;
        TakeCoefficients(ascent, coefficients, standardErrors);
        if (ascent == Ascent.Endless && IsUndetermined(coefficients, standardErrors))
            return fit with { Outcome = Outcome.Collinear };
        fit = fit with
        {
            LogLikelihood = maximum,
            LikelihoodRatio = ChiSquaredTest.Of(2 * (maximum - fit.LogLikelihoodOfCovariates), Exposures),
            Evaluations = _point.Evaluations,
            Remarks = fit.Remarks | (ascent == Ascent.Endless ? Remarks.Separated : Remarks.None),
        };
        fit = fit with
        {
            OverallLikelihoodRatio = _adjusting == 0
                ? fit.LikelihoodRatio
                : ChiSquaredTest.Of(2 * (maximum - fit.NullLogLikelihood), _free.Length),
        };
        if (ascent == Ascent.Reached)
        {
            fit = fit with { Wald = Wald(Exposures, coefficients) };
            fit = fit with { OverallWald = _adjusting == 0 ? fit.Wald : Wald(_free.Length, coefficients) };
        }

        return _columns - _covariates == 1 ? WithInterval(fit, options, interval, coefficients[^1], standardErrors[^1]) : fit;
    }

    private readonly int FirstLeftOut()
    {
        for (int c = 0; c < _covariates; c++)
        {
            if (!_free[.._adjusting].Contains(c))
                return c;
        }

        return -1;
    }

    // At the maximum of the covariates the gradient is left in the exposures alone, so the same form tests them.
    private readonly ChiSquaredTest Score(int degreesOfFreedom)
    {
        if (!Cholesky.TryFactor(_point.Information, _columns, _free, _factor))
            return ChiSquaredTest.None;
        Span<double> root = _work[.._free.Length];
        for (int i = 0; i < root.Length; i++)
            root[i] = _point.Gradient[_free[i]];
        Cholesky.SolveLower(_factor, root);
        double statistic = 0;
        foreach (double entry in root)
            statistic += entry * entry;
        return ChiSquaredTest.Of(statistic, degreesOfFreedom);
    }

    private readonly ChiSquaredTest Wald(int last, ReadOnlySpan<double> coefficients)
    {
        Span<double> tested = _work[..last];
        for (int i = 0; i < last; i++)
            tested[i] = coefficients[_free[_free.Length - last + i]];
        return ChiSquaredTest.Of(Cholesky.WaldOfLast(_factor, _free.Length, tested), last);
    }

    // Where covariates alone separate the roles, nothing may be left in the sets to tell an exposure's share by.
    private readonly bool IsUndetermined(ReadOnlySpan<double> coefficients, ReadOnlySpan<double> standardErrors)
    {
        foreach (int c in _free[_adjusting..])
        {
            if (double.IsInfinity(coefficients[c]) || standardErrors[c] * _point.Spreads[c] <= LargestError)
                return false;
        }

        return true;
    }

    // Leaves the factor of the information at the maximum behind.
    private readonly void TakeCoefficients(Ascent ascent, Span<double> coefficients, Span<double> standardErrors)
    {
        coefficients.Fill(double.NaN);
        standardErrors.Fill(double.NaN);
        double largest = 0;
        for (int c = 0; c < _columns; c++)
            largest = Math.Max(largest, Math.Abs(_point.Step[c]) * _point.Spreads[c]);
        bool factored = Cholesky.TryFactor(_point.Information, _columns, _free, _factor);
        for (int i = 0; i < _free.Length; i++)
        {
            int c = _free[i];
            coefficients[c] = _point.Beta[c];
            if (ascent == Ascent.Endless && Math.Abs(_point.Step[c]) * _point.Spreads[c] > PartOfDirection * largest)
            {
                coefficients[c] = _point.Step[c] > 0 ? double.PositiveInfinity : double.NegativeInfinity;
                continue;
            }

            if (!factored)
                continue;
            Span<double> unit = _work[.._free.Length];
            unit.Clear();
            unit[i] = 1;
            Cholesky.SolveLower(_factor, unit);
            double variance = 0;
            foreach (double entry in unit)
                variance += entry * entry;
            standardErrors[c] = Math.Sqrt(variance);
        }
    }

    private ConditionalLogisticFit WithInterval(
        in ConditionalLogisticFit fit, TestOptions options, ConditionalInterval interval, double estimate, double standardError)
    {
        double quantile = StandardNormal.UpperQuantile(options.TailShare);
        bool byProfile = interval == ConditionalInterval.Profile || double.IsNaN(standardError);
        double low, high;
        if (quantile == 0)
        {
            // Half the confidence on one side ends at the estimate itself, wherever that is.
            low = estimate;
            high = estimate;
        }
        else if (byProfile)
        {
            int exposure = _columns - 1;
            double level = fit.LogLikelihood - (quantile * quantile / 2);
            double start = double.IsFinite(estimate) ? estimate : 0;
            double step = double.IsNaN(standardError) ? 1 / _point.Spreads[exposure] : quantile * standardError;
            low = double.IsNegativeInfinity(estimate) ? estimate : FindLimit(exposure, level, start, -step);
            high = double.IsPositiveInfinity(estimate) ? estimate : FindLimit(exposure, level, start, step);
        }
        else
        {
            low = estimate - (quantile * standardError);
            high = estimate + (quantile * standardError);
        }

        return fit with
        {
            Estimate = estimate,
            StandardError = standardError,
            Interval = Interval.Pointing(low, high, options.Sides),
            Remarks = fit.Remarks | (double.IsNaN(low) || double.IsNaN(high) ? Remarks.NotConverged : Remarks.None),
        };
    }

    private double FindLimit(int exposure, double level, double from, double reach) =>
        ProfileLimit.Find(_likelihood, ref _point, _free[.._adjusting], exposure, level, from, reach);
}
