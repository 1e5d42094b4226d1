using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Sets;

/// <summary>Least squares of an endpoint on the index role with an intercept a set, and covariates.</summary>
/// <remarks>
/// Every column is centred within sets, which is the same as one intercept a set; then covariates, role and endpoint are made
/// orthogonal in this order (twice, so that rounding does not leave them aslant). Offsets leave with the first value of a set.
/// </remarks>
internal readonly ref struct WithinSetRegression
{
    // Share of a centred column left after the ones in front of it, below which it follows from them.
    private const double DependentShare = 1e-10;

    private readonly ReadOnlySpan<double> _role;
    private readonly ReadOnlySpan<double> _residuals;
    private readonly ReadOnlySpan<int> _starts;
    private readonly double _roleSquares;

    private WithinSetRegression(ReadOnlySpan<double> role, ReadOnlySpan<double> residuals, ReadOnlySpan<int> starts, double roleSquares)
    {
        _role = role;
        _residuals = residuals;
        _starts = starts;
        _roleSquares = roleSquares;
    }

    /// <summary>Whether there is something to test, and if not, why not.</summary>
    public Outcome Outcome { get; private init; }

    /// <summary>Index minus reference, endpoint units, adjusted for the covariates.</summary>
    public double Estimate { get; private init; }

    /// <summary>Degrees of freedom of the residuals: members − sets − 1 − covariates kept.</summary>
    public int DegreesOfFreedom { get; private init; }

    /// <summary>Remarks on what was left out.</summary>
    public Remarks Remarks { get; private init; }

    /// <summary>Standard deviation of the residuals within sets, endpoint units.</summary>
    public double ResidualDeviation => Math.Sqrt(SumOfProducts(_residuals, _residuals) / DegreesOfFreedom);

    /// <summary>Standard error of the estimate where all members vary alike and independently.</summary>
    public double StandardError => ResidualDeviation / Math.Sqrt(_roleSquares);

    /// <summary>
    /// Standard error of the estimate that lets members of a set be related and sets vary unlike: the sandwich over sets times
    /// S/(S − 1).
    /// </summary>
    public double RobustStandardError
    {
        get
        {
            int sets = _starts.Length - 1;
            double squares = 0;
            for (int s = 0; s < sets; s++)
            {
                double score = 0;
                for (int member = _starts[s]; member < _starts[s + 1]; member++)
                    score += _role[member] * _residuals[member];
                squares += score * score;
            }

            return Math.Sqrt(squares * sets / (sets - 1)) / _roleSquares;
        }
    }

    /// <summary>Fits the regression.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public static WithinSetRegression Of(in SetSample sets, in Scratch.Frame frame)
    {
        int members = sets.Members;
        Span<double> kept = frame.Doubles(members * sets.CovariateCount);
        int covariates = TakeCovariates(sets, kept, frame.Integers(sets.CovariateCount));
        kept = kept[..(covariates * members)];
        Span<double> role = frame.Doubles(members);
        role.Clear();
        for (int s = 0; s < sets.Sets; s++)
            role.Slice(sets.Starts[s], sets.IndexCounts[s]).Fill(1);
        Centre(role, sets.Starts);
        double roleSquares = MakeOrthogonal(role, kept);

        Span<double> residuals = frame.Doubles(members);
        sets.Values.CopyTo(residuals);
        Centre(residuals, sets.Starts);
        double flat = Rounding(sets), spread = SumOfProducts(residuals, residuals);
        TakeOff(residuals, kept);
        double estimate = SumOfProducts(role, residuals) / roleSquares;
        for (int i = 0; i < members; i++)
            residuals[i] -= estimate * role[i];

        int df = members - sets.Sets - 1 - covariates;
        Outcome outcome = df < 1 ? Outcome.TooFewSets
            : spread <= flat ? Outcome.NothingDiffers
            : roleSquares == 0 ? Outcome.Collinear
            : SumOfProducts(residuals, residuals) <= flat ? Outcome.NoVariation
            : Outcome.Tested;
        return new WithinSetRegression(role, residuals, sets.Starts, roleSquares)
        {
            Outcome = outcome,
            Estimate = estimate,
            DegreesOfFreedom = df,
            Remarks = covariates < sets.CovariateCount ? Remarks.CollinearCovariate : Remarks.None,
        };
    }

    /// <summary>Centres the covariates within sets and makes each orthogonal to those in front of it; those that leave nothing are left out.</summary>
    /// <param name="sets">Sets with covariates.</param>
    /// <param name="kept">Receives the columns, one after another.</param>
    /// <param name="independent">Receives their positions.</param>
    /// <returns>How many were kept.</returns>
    public static int TakeCovariates(in SetSample sets, Span<double> kept, Span<int> independent)
    {
        int covariates = 0;
        for (int c = 0; c < sets.CovariateCount; c++)
        {
            Span<double> column = kept.Slice(covariates * sets.Members, sets.Members);
            sets.Covariate(c).CopyTo(column);
            Centre(column, sets.Starts);
            if (MakeOrthogonal(column, kept[..(covariates * sets.Members)]) > 0)
                independent[covariates++] = c;
        }

        return covariates;
    }

    /// <summary>Refers the estimate over a standard error to Student's t.</summary>
    /// <param name="sets">The sets that were fitted.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="error">One of the standard errors.</param>
    /// <param name="df">Its degrees of freedom.</param>
    public TestResult Test(in SetSample sets, TestOptions options, double error, int df)
    {
        double t = Estimate / error;
        double reach = error * StudentTQuantiles.Upper(options.TailShare, df);
        return new TestResult
        {
            Sets = sets.Sets,
            Samples = sets.Members,
            Estimate = Estimate,
            StandardError = error,
            Interval = Interval.Pointing(Estimate - reach, Estimate + reach, options.Sides),
            Statistic = t,
            DegreesOfFreedom = df,
            P = Tails.ForSides(options.Sides, StudentT.LowerTail(t, df), StudentT.UpperTail(t, df)),
            Remarks = Remarks,
        };
    }

    // What the decimal rule allows the squares of a column to sum to where its decimals do not vary within sets.
    private static double Rounding(in SetSample sets)
    {
        double sum = 0;
        foreach (double value in sets.Values)
        {
            double rounding = DecimalRounding.Of(Math.Abs(value));
            sum += rounding * rounding;
        }

        return sum;
    }

    private static void Centre(Span<double> column, ReadOnlySpan<int> starts)
    {
        for (int s = 0; s + 1 < starts.Length; s++)
        {
            Span<double> set = column[starts[s]..starts[s + 1]];
            double origin = set[0], sum = 0;
            foreach (double value in set)
                sum += value - origin;
            double mean = sum / set.Length;
            for (int i = 0; i < set.Length; i++)
                set[i] = set[i] - origin - mean;
        }
    }

    // Answers the sum of squares left, 0 where nothing but rounding is.
    private static double MakeOrthogonal(Span<double> column, ReadOnlySpan<double> basis)
    {
        double before = SumOfProducts(column, column);
        TakeOff(column, basis);
        TakeOff(column, basis);
        double left = SumOfProducts(column, column);
        return left > DependentShare * before ? left : 0;
    }

    private static void TakeOff(Span<double> column, ReadOnlySpan<double> basis)
    {
        for (int at = 0; at < basis.Length; at += column.Length)
        {
            ReadOnlySpan<double> other = basis.Slice(at, column.Length);
            double share = SumOfProducts(column, other) / SumOfProducts(other, other);
            for (int i = 0; i < column.Length; i++)
                column[i] -= share * other[i];
        }
    }

    private static double SumOfProducts(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        double first = 0, second = 0, third = 0, fourth = 0;
        int i = 0;
        for (; i <= left.Length - 4; i += 4)
        {
            first += left[i] * right[i];
            second += left[i + 1] * right[i + 1];
            third += left[i + 2] * right[i + 2];
            fourth += left[i + 3] * right[i + 3];
        }

        double sum = first + second + (third + fourth);
        for (; i < left.Length; i++)
            sum += left[i] * right[i];
        return sum;
    }
}
