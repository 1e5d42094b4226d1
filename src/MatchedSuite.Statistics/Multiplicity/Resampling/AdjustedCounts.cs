namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>From counts of flips to adjusted p-values, filled from the most significant endpoint on.</summary>
internal sealed class AdjustedCounts
{
    private readonly Probability[] _stepDown;
    private readonly Probability[] _singleStep;
    private readonly int[] _stepDownCounts;
    private readonly int[] _singleStepCounts;
    private readonly int _flips;
    private int _largest;

    /// <summary>Every endpoint missing so far.</summary>
    public AdjustedCounts(int endpoints, int flips)
    {
        _flips = flips;
        _stepDown = new Probability[endpoints];
        _singleStep = new Probability[endpoints];
        _stepDownCounts = new int[endpoints];
        _singleStepCounts = new int[endpoints];
        Array.Fill(_stepDown, Probability.Missing);
        Array.Fill(_singleStep, Probability.Missing);
        Array.Fill(_stepDownCounts, -1);
        Array.Fill(_singleStepCounts, -1);
    }

    /// <summary>Adds the next endpoint in order of significance; its step-down count is no smaller than those before it.</summary>
    public void Add(int endpoint, int stepDown, int singleStep)
    {
        _largest = Math.Max(_largest, stepDown);
        _stepDownCounts[endpoint] = _largest;
        _singleStepCounts[endpoint] = singleStep;
        _stepDown[endpoint] = Share(_largest);
        _singleStep[endpoint] = Share(singleStep);
    }

    /// <summary>The result of the run.</summary>
    public ResamplingResult ToResult(ISignPatterns flips, double criticalValue) => new()
    {
        StepDown = _stepDown,
        SingleStep = _singleStep,
        StepDownExceedances = _stepDownCounts,
        SingleStepExceedances = _singleStepCounts,
        Flips = flips.Count,
        Exhaustive = flips.Exhaustive,
        CriticalValue = criticalValue,
    };

    // The data as they are count as one of the flips, so no p-value is 0.
    private Probability Share(int reached) => Probability.Of((1.0 + reached) / (1.0 + _flips));
}
