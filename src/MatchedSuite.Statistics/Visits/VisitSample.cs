namespace MatchedSuite.Statistics.Visits;

/// <summary>One endpoint measured on subjects at repeated visits: what every visit method sees.</summary>
/// <remarks>
/// <para>Shape: the value of subject i at visit j stands at i·k + j (k visits); NaN is missing. Covariate q of that
/// observation stands at (i·k + j)·c + q (c covariates); an observation with a missing covariate counts as missing.</para>
/// <para>Units: values in the endpoint's unit on the analysis scale; <see cref="Times"/> in the unit that a slope is wanted per.</para>
/// </remarks>
public readonly ref struct VisitSample
{
    private VisitSample(
        ReadOnlySpan<double> values, ReadOnlySpan<double> times, ReadOnlySpan<double> covariates, int covariateCount)
    {
        Values = values;
        Times = times;
        Covariates = covariates;
        CovariateCount = covariateCount;
    }

    /// <summary>Subjects × visits values, subject after subject.</summary>
    public ReadOnlySpan<double> Values { get; }

    /// <summary>One time a visit, finite and not all equal; the scores of a trend.</summary>
    public ReadOnlySpan<double> Times { get; }

    /// <summary>Subjects × visits × covariates; empty where there are none.</summary>
    public ReadOnlySpan<double> Covariates { get; }

    /// <summary>Covariates of each observation.</summary>
    public int CovariateCount { get; }

    /// <summary>Number of visits, at least 2.</summary>
    public int Visits => Times.Length;

    /// <summary>Number of subjects, with or without values.</summary>
    public int Subjects => Values.Length / Times.Length;

    /// <summary>All values of one subject in the order of the visits.</summary>
    public ReadOnlySpan<double> Subject(int subject) => Values.Slice(subject * Visits, Visits);

    /// <summary>A sample whose visits stand at <paramref name="times"/>, equally spaced or not.</summary>
    /// <exception cref="ArgumentException">Fewer than two visits, values that fill no whole table, or times that don't differ.</exception>
    public static VisitSample Of(ReadOnlySpan<double> values, ReadOnlySpan<double> times)
    {
        if (times.Length < 2)
            throw new ArgumentException($"There are {times.Length} visits; repeated measurement needs at least 2.", nameof(times));
        if (values.Length % times.Length != 0)
            throw new ArgumentException($"{values.Length} values do not fill whole rows of {times.Length} visits.", nameof(values));
        double low = times[0], high = times[0];
        foreach (double time in times)
        {
            low = Math.Min(low, time);
            high = Math.Max(high, time);
        }

        if (!(double.IsFinite(low) && double.IsFinite(high) && low < high))
            throw new ArgumentException("The times of the visits must be finite and not all equal.", nameof(times));
        return new VisitSample(values, times, default, 0);
    }

    /// <summary>A sample whose visits are equally spaced: times 0, 1, 2, …</summary>
    /// <param name="values">Subjects × visits values, subject after subject, NaN where missing.</param>
    /// <param name="visits">Number of visits, at least 2.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">Fewer than two visits, or values that fill no whole table.</exception>
    public static VisitSample Of(ReadOnlySpan<double> values, int visits, in Scratch.Frame frame)
    {
        Span<double> times = frame.Doubles(Math.Max(visits, 0));
        for (int j = 0; j < times.Length; j++)
            times[j] = j;
        return Of(values, times);
    }

    /// <summary>The same values with covariates beside each observation.</summary>
    /// <param name="covariates">Subjects × visits × <paramref name="count"/> numbers, NaN where missing.</param>
    /// <param name="count">Covariates of each observation, at least 1.</param>
    /// <exception cref="ArgumentException">The number of covariate values does not fit.</exception>
    public VisitSample WithCovariates(ReadOnlySpan<double> covariates, int count)
    {
        if (count < 1 || covariates.Length != Values.Length * count)
            throw new ArgumentException($"{covariates.Length} covariate values do not give {Values.Length} observations {count} each.", nameof(covariates));
        return new VisitSample(Values, Times, covariates, count);
    }

    /// <summary>The values of subjects seen at every visit, without covariates.</summary>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public VisitSample Complete(in Scratch.Frame frame)
    {
        Span<double> kept = frame.Doubles(Values.Length);
        int used = 0;
        for (int i = 0; i < Subjects; i++)
        {
            var row = Subject(i);
            if (HasMissing(row))
                continue;
            row.CopyTo(kept[used..]);
            used += row.Length;
        }

        return new VisitSample(kept[..used], Times, default, 0);
    }

    private static bool HasMissing(ReadOnlySpan<double> row)
    {
        foreach (double value in row)
        {
            if (double.IsNaN(value))
                return true;
        }

        return false;
    }
}
