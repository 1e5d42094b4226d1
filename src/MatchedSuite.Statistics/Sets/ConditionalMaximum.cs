namespace MatchedSuite.Statistics.Sets;

/// <summary>A point of the conditional likelihood and the climb from it by Newton's method with step halving.</summary>
/// <remarks>
/// The log-likelihood is concave, so a step that is halved until it does not fall leads to the maximum or along a direction of
/// endless rise. The climb ends where the next step would be shorter than 1e-12 standard errors; that step is still taken, so the
/// estimate is right to rounding and the information to about 1e-12 of itself.
/// </remarks>
internal ref struct ConditionalMaximum
{
    private const int MostSteps = 100;
    private const int MostHalvings = 60;

    // A regular maximum is reached in four to six steps; only then is it worth asking whether there is one.
    private const int StepsBeforeDoubt = 6;
    private const double SquaredStep = 1e-24;
    private const double SquaredStepOfRounding = 1e-12;
    private const double NoGain = 1e-10;
    private const double RoundingOfLikelihood = 1e-13;

    // By the time the gain is gone the other coefficients lag by about this share of the endless direction.
    private const double DirectionTolerance = 1e-6;

    // A gradient this small, in units of the information at zero, where the information has faded: the top of an endless rise.
    private const double FlatSlope = 1e-8;

    private const double Damping = 1e-6;

    // A step this many times as long as the way to the point so far, or as the same unit, comes from information that has
    // faded; halving would start too far out.
    private const double LongestStep = 1000;

    private readonly Span<double> _factor;
    private readonly Span<double> _newton;
    private readonly Span<double> _before;
    private readonly Span<double> _tolerances;

    /// <summary>Takes working memory; the point starts at zero, unevaluated.</summary>
    public ConditionalMaximum(int columns, in Scratch.Frame frame)
    {
        Beta = frame.Doubles(columns);
        Gradient = frame.Doubles(columns);
        Information = frame.Doubles(columns * columns);
        Step = frame.Doubles(columns);
        _factor = frame.Doubles(columns * columns);
        _newton = frame.Doubles(columns);
        _before = frame.Doubles(columns);
        _tolerances = frame.Doubles(columns);
        Spreads = frame.Doubles(columns);
        Beta.Clear();
        Step.Clear();
    }

    /// <summary>The point: one coefficient a column.</summary>
    public Span<double> Beta { get; }

    /// <summary>First derivatives at the point.</summary>
    public Span<double> Gradient { get; }

    /// <summary>Information at the point, lower triangle.</summary>
    public Span<double> Information { get; }

    /// <summary>The last step tried, one entry a column.</summary>
    public Span<double> Step { get; }

    /// <summary>Square roots of the information's diagonal at zero: what one unit of a coefficient means.</summary>
    public Span<double> Spreads { get; }

    /// <summary>Log-likelihood at the point.</summary>
    public double LogLikelihood { get; private set; }

    /// <summary>How often the likelihood was evaluated.</summary>
    public int Evaluations { get; private set; }

    /// <summary>Evaluates the likelihood at the point; the first time must be at zero.</summary>
    public void Evaluate(in ConditionalLikelihood likelihood)
    {
        LogLikelihood = likelihood.Evaluate(Beta, Gradient, Information);
        Evaluations++;
        if (Evaluations > 1)
            return;
        for (int c = 0; c < Beta.Length; c++)
            Spreads[c] = Math.Sqrt(Information[(c * Beta.Length) + c]);
    }

    /// <summary>Climbs from an evaluated point, moving some coefficients only.</summary>
    /// <param name="likelihood">What to maximise.</param>
    /// <param name="free">The columns whose coefficients move.</param>
    public Ascent Climb(in ConditionalLikelihood likelihood, ReadOnlySpan<int> free)
    {
        if (free.IsEmpty)
            return Ascent.Reached;
        double squared = double.PositiveInfinity, gain = double.PositiveInfinity;
        for (int count = 1; count <= MostSteps; count++)
        {
            if (Cholesky.TryFactor(Information, Beta.Length, free, _factor))
                squared = FindStep(free);
            else if (IsFlat(free) || (gain < NoGain && RisesForEver(likelihood)))
                return Ascent.Endless;
            else
                squared = FindDampedStep(free);
            if (squared <= SquaredStep)
            {
                Move(1);
                LogLikelihood += squared / 2;
                return Ascent.Reached;
            }

            gain = TakeStep(likelihood);
            if (double.IsNaN(gain))
                break;
            if (count < StepsBeforeDoubt)
                continue;
            // For a single column the limit has a closed form; otherwise the gain must have died away.
            if ((Beta.Length == 1 || gain < NoGain) && RisesForEver(likelihood))
                return Ascent.Endless;
        }

        return squared <= SquaredStepOfRounding ? Ascent.Reached : Ascent.Lost;
    }

    private readonly bool RisesForEver(in ConditionalLikelihood likelihood)
    {
        double longest = LongestPart(Step);
        for (int c = 0; c < Step.Length; c++)
            _tolerances[c] = Step.Length == 1 || Spreads[c] == 0 ? 0 : DirectionTolerance * longest / Spreads[c];
        return likelihood.NeverFallsAlong(Step, _tolerances);
    }

    private readonly double LongestPart(ReadOnlySpan<double> way)
    {
        double longest = 0;
        for (int c = 0; c < way.Length; c++)
            longest = Math.Max(longest, Math.Abs(way[c]) * Spreads[c]);
        return longest;
    }

    private readonly bool IsFlat(ReadOnlySpan<int> free)
    {
        foreach (int c in free)
        {
            if (Math.Abs(Gradient[c]) > FlatSlope * Spreads[c])
                return false;
        }

        return true;
    }

    // Newton's step into Step; answers its squared length in standard errors.
    private readonly double FindStep(ReadOnlySpan<int> free)
    {
        Span<double> newton = _newton[..free.Length];
        for (int i = 0; i < free.Length; i++)
            newton[i] = Gradient[free[i]];
        Cholesky.SolveLower(_factor, newton);
        double squared = 0;
        foreach (double entry in newton)
            squared += entry * entry;
        Cholesky.SolveUpper(_factor, newton);
        Step.Clear();
        for (int i = 0; i < free.Length; i++)
            Step[free[i]] = newton[i];
        return squared;
    }

    // Where the information has faded in some direction, a little of that at zero keeps the step finite (Levenberg 1944); its length
    // says nothing.
    private readonly double FindDampedStep(ReadOnlySpan<int> free)
    {
        foreach (int c in free)
            Information[(c * Beta.Length) + c] += Damping * Spreads[c] * Spreads[c];
        if (Cholesky.TryFactor(Information, Beta.Length, free, _factor))
            FindStep(free);
        return double.PositiveInfinity;
    }

    // Goes the step, or the largest half, quarter, … of it that does not fall; NaN where none does.
    private double TakeStep(in ConditionalLikelihood likelihood)
    {
        double before = LogLikelihood, length = Math.Min(1, LongestStep * (1 + LongestPart(Beta)) / LongestPart(Step));
        Beta.CopyTo(_before);
        for (int halving = 0; halving < MostHalvings; halving++, length /= 2)
        {
            _before.CopyTo(Beta);
            Move(length);
            Evaluate(likelihood);
            if (LogLikelihood >= before - (RoundingOfLikelihood * Math.Abs(before)))
                return LogLikelihood - before;
        }

        return double.NaN;
    }

    private readonly void Move(double length)
    {
        for (int c = 0; c < Step.Length; c++)
            Beta[c] += length * Step[c];
    }
}
