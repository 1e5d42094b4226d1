using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>The restricted likelihood of a random-intercept model as a function of the variance ratio λ alone.</summary>
/// <remarks>
/// <para>λ is the variance between subjects over the variance within. Fixed effects and the variance within are profiled
/// out: −2·log-likelihood = (N − p)·ln RSS(λ) + ln|V(λ)| + ln|X'V⁻¹X| + constant. One evaluation costs a few matrices of
/// p + 1 rows, whatever the number of subjects; first and second derivatives in λ are analytic.</para>
/// <para>Sources: Patterson &amp; Thompson (1971), Biometrika 58, 545-554; Laird &amp; Ware (1982), Biometrics 38, 963-974.</para>
/// </remarks>
internal ref struct RandomInterceptProfile
{
    private readonly RandomInterceptMoments _moments;
    private readonly ReadOnlySpan<double> _smallestPivots;
    private readonly Span<double> _weighted;
    private readonly Span<double> _factor;
    private readonly Span<double> _slope;
    private readonly Span<double> _curvature;
    private readonly Span<double> _inverse;
    private readonly Span<double> _work;
    private readonly Span<double> _residual;
    private readonly Span<double> _change;
    private readonly Span<double> _turned;

    public RandomInterceptProfile(scoped in RandomInterceptMoments moments, ReadOnlySpan<double> smallestPivots, in Scratch.Frame frame)
    {
        int order = moments.Parameters + 1, packed = PackedSymmetric.Length(order);
        _moments = moments;
        _smallestPivots = smallestPivots;
        _weighted = frame.Doubles(packed);
        _factor = frame.Doubles(packed);
        _slope = frame.Doubles(packed);
        _curvature = frame.Doubles(packed);
        _inverse = frame.Doubles(packed);
        _work = frame.Doubles(packed);
        _residual = frame.Doubles(order);
        _change = frame.Doubles(order);
        _turned = frame.Doubles(order);
    }

    /// <summary>The ratio of the last evaluation.</summary>
    public double Ratio { get; private set; }

    /// <summary>Generalised residual sum of squares r'V⁻¹r.</summary>
    public double Residuals { get; private set; }

    /// <summary>Its first derivative in λ.</summary>
    public double ResidualsSlope { get; private set; }

    /// <summary>Its second derivative in λ.</summary>
    public double ResidualsCurvature { get; private set; }

    /// <summary>ln|V| + ln|X'V⁻¹X|.</summary>
    public double LogDeterminants { get; private set; }

    /// <summary>Its first derivative in λ.</summary>
    public double LogDeterminantsSlope { get; private set; }

    /// <summary>Its second derivative in λ.</summary>
    public double LogDeterminantsCurvature { get; private set; }

    /// <summary>N − p.</summary>
    public readonly int DegreesOfFreedom => _moments.Observations - _moments.Parameters;

    /// <summary>−2·profile log-likelihood without constants.</summary>
    public readonly double Deviance => DegreesOfFreedom * Math.Log(Residuals) + LogDeterminants;

    /// <summary>First derivative of <see cref="Deviance"/> in λ.</summary>
    public readonly double Score => DegreesOfFreedom * ResidualsSlope / Residuals + LogDeterminantsSlope;

    /// <summary>Second derivative of <see cref="Deviance"/> in λ.</summary>
    public readonly double Curvature
    {
        get
        {
            double relative = ResidualsSlope / Residuals;
            return DegreesOfFreedom * (ResidualsCurvature / Residuals - relative * relative) + LogDeterminantsCurvature;
        }
    }

    /// <summary>Fixed effects, negative, and a last 1: the combination of the columns that is the residual.</summary>
    public readonly ReadOnlySpan<double> Residual => _residual;

    /// <summary>Packed (X'V⁻¹X)⁻¹.</summary>
    public readonly ReadOnlySpan<double> Inverse => _inverse;

    /// <summary>Packed derivative of the weighted cross-products in λ; its leading block is that of X'V⁻¹X.</summary>
    public readonly ReadOnlySpan<double> CrossProductsSlope => _slope;

    /// <summary>Evaluates everything at a ratio.</summary>
    /// <returns>False where columns depend on each other.</returns>
    public bool Evaluate(double ratio)
    {
        int parameters = _moments.Parameters, order = parameters + 1;
        Combine(ratio);
        if (!FactorAndSolve(order))
            return false;
        Cholesky.Invert(_factor, parameters, _work, _inverse);

        PackedSymmetric.Multiply(_slope, _residual, order, _change);
        ResidualsSlope = Dot(_change, _residual, order);
        PackedSymmetric.Multiply(_inverse, _change, parameters, _turned);
        ResidualsCurvature = PackedSymmetric.QuadraticForm(_curvature, _residual, order) - 2 * Dot(_turned, _change, parameters);

        LogDeterminants += Cholesky.LogDeterminant(_factor, parameters);
        LogDeterminantsSlope += PackedSymmetric.TraceOfProduct(_inverse, _slope, parameters);
        LogDeterminantsCurvature += PackedSymmetric.TraceOfProduct(_inverse, _curvature, parameters) - TraceOfSquare(parameters);
        return true;
    }

    /// <summary>Evaluates <see cref="Residuals"/> and <see cref="ResidualsSlope"/> alone, at a ratio where columns are known to be independent.</summary>
    public void EvaluateResiduals(double ratio)
    {
        int order = _moments.Parameters + 1;
        Combine(ratio);
        FactorAndSolve(order);
        ResidualsSlope = PackedSymmetric.QuadraticForm(_slope, _residual, order);
    }

    // M = W + Σ S_m/(m(1 + λm)) with its derivatives; ln|V| = Σ N_m ln(1 + λm) with its own.
    private void Combine(double ratio)
    {
        Ratio = ratio;
        _moments.Within.CopyTo(_weighted);
        _slope.Clear();
        _curvature.Clear();
        double logarithm = 0, slope = 0, curvature = 0;
        for (int size = 1; size <= _moments.SubjectsBySize.Length; size++)
        {
            int subjects = _moments.SubjectsBySize[size - 1];
            if (subjects == 0)
                continue;
            double growth = 1 + ratio * size, part = size / growth;
            logarithm += subjects * Math.Log(growth);
            slope += subjects * part;
            curvature -= subjects * part * part;
            AddScaled(_moments.BetweenOf(size), growth, size);
        }

        (LogDeterminants, LogDeterminantsSlope, LogDeterminantsCurvature) = (logarithm, slope, curvature);
    }

    private readonly void AddScaled(ReadOnlySpan<double> between, double growth, int size)
    {
        double weight = 1 / (size * growth), slope = -1 / (growth * growth), curvature = -2 * size * slope / growth;
        Span<double> weighted = _weighted[..between.Length], first = _slope[..between.Length], second = _curvature[..between.Length];
        for (int at = 0; at < between.Length; at++)
        {
            double value = between[at];
            weighted[at] += weight * value;
            first[at] += slope * value;
            second[at] += curvature * value;
        }
    }

    private bool FactorAndSolve(int order)
    {
        int parameters = order - 1;
        int rank = Cholesky.Factor(_weighted, order, _smallestPivots, _factor);
        double last = _factor[PackedSymmetric.At(parameters, parameters)];
        Residuals = last * last;
        if (rank - (last > 0 ? 1 : 0) < parameters)
            return false;
        var start = _factor.Slice(PackedSymmetric.Length(parameters), parameters);
        for (int column = 0; column < parameters; column++)
            _residual[column] = -start[column];
        Cholesky.SolveTransposed(_factor, parameters, _residual);
        _residual[parameters] = 1;
        return true;
    }

    // trace of (A⁻¹A')², A the leading block.
    private readonly double TraceOfSquare(int parameters)
    {
        double diagonal = 0, pairs = 0;
        for (int row = 0; row < parameters; row++)
        {
            for (int column = 0; column <= row; column++)
            {
                double there = Element(row, column, parameters);
                if (row == column)
                    diagonal += there * there;
                else
                    pairs += there * Element(column, row, parameters);
            }
        }

        return diagonal + 2 * pairs;
    }

    private readonly double Element(int row, int column, int parameters)
    {
        double sum = 0;
        for (int i = 0; i < parameters; i++)
            sum += _inverse[PackedSymmetric.At(row, i)] * _slope[PackedSymmetric.At(i, column)];
        return sum;
    }

    private static double Dot(ReadOnlySpan<double> left, ReadOnlySpan<double> right, int length)
    {
        double sum = 0;
        for (int i = 0; i < length; i++)
            sum += left[i] * right[i];
        return sum;
    }
}
