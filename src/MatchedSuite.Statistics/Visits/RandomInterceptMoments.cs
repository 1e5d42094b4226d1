using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Everything the likelihood of a random-intercept model needs to know of one endpoint.</summary>
/// <remarks>
/// <para>Columns: first the group columns (one indicator a visit, or the constant), then the measured columns (time of a
/// line, covariates), last the endpoint; order = parameters + 1. Cross-products are split into those within subjects and,
/// by the number m of observations a subject has, those of the subjects' sums. With the variance ratio λ the weighted
/// cross-products are W + Σ S_m / (m(1 + λm)): only positive parts, so nothing cancels.</para>
/// <para>Measured columns are centred: <see cref="Centres"/> holds what was taken off. From the endpoint its first value is
/// taken, then each group's mean: what a common level or the visits explain never meets the squares, so it costs no digit.</para>
/// </remarks>
internal readonly ref struct RandomInterceptMoments
{
    /// <summary>Indicator columns.</summary>
    public int Groups { get; private init; }

    /// <summary>Fixed effects: group columns and measured columns without the endpoint.</summary>
    public int Parameters { get; private init; }

    /// <summary>Subjects with at least one observation.</summary>
    public int Subjects { get; private init; }

    /// <summary>Observations with value and covariates.</summary>
    public int Observations { get; private init; }

    /// <summary>The largest absolute value of the endpoint, for judging what is rounding.</summary>
    public double LargestMagnitude { get; private init; }

    /// <summary>Packed cross-products within subjects.</summary>
    public ReadOnlySpan<double> Within { get; private init; }

    /// <summary>Packed cross-products of the sums of subjects with m = 1, 2, … observations, one matrix after another.</summary>
    public ReadOnlySpan<double> Between { get; private init; }

    /// <summary>The part of <see cref="Between"/> of subjects with <paramref name="size"/> observations.</summary>
    public ReadOnlySpan<double> BetweenOf(int size) => Between.Slice((size - 1) * Within.Length, Within.Length);

    /// <summary>Number of subjects with m = 1, 2, … observations.</summary>
    public ReadOnlySpan<int> SubjectsBySize { get; private init; }

    /// <summary>What was taken off the measured columns without the endpoint.</summary>
    public ReadOnlySpan<double> Centres { get; private init; }

    /// <summary>What was taken off every value of the endpoint.</summary>
    public double Origin { get; private init; }

    /// <summary>What was taken off the endpoint beside <see cref="Origin"/>, group by group.</summary>
    public ReadOnlySpan<double> Levels { get; private init; }

    /// <summary>Gathers the moments of a sample.</summary>
    public static RandomInterceptMoments Of(in VisitSample sample, VisitTerm term, in Scratch.Frame frame)
    {
        int visits = sample.Visits;
        int groups = term == VisitTerm.Means ? visits : 1;
        int times = term == VisitTerm.Line ? 1 : 0;
        int measured = times + sample.CovariateCount + 1;
        int packed = PackedSymmetric.Length(groups + measured);
        Span<double> within = frame.Doubles(packed);
        Span<double> between = frame.Doubles(packed * visits);
        Span<double> centres = frame.Doubles(measured), levels = frame.Doubles(groups);
        Span<int> bySize = frame.Integers(visits);
        Span<double> means = frame.Doubles(sample.Subjects * measured);
        Span<int> sizes = frame.Integers(sample.Subjects);
        Span<int> places = frame.Integers(sample.Values.Length);
        within.Clear();
        between.Clear();
        bySize.Clear();

        Origins(sample, times, centres);
        double origin = centres[^1];
        GroupMeans(sample, origin, levels, frame);
        centres[^1] = 0;
        Span<double> rows = frame.Doubles(visits * measured);
        int observations = 0, subjects = 0, placed = 0;
        double largest = 0;
        for (int i = 0; i < sample.Subjects; i++)
        {
            Span<int> present = places.Slice(placed, visits);
            int size = Read(sample, i, times, centres, rows, present);
            TakeLevels(rows[..(size * measured)], present[..size], origin, levels, ref largest);
            sizes[i] = size;
            placed += size;
            if (size == 0)
                continue;
            subjects++;
            observations += size;
            bySize[size - 1]++;
            AddWithin(rows[..(size * measured)], present[..size], groups, measured, means.Slice(i * measured, measured), within);
        }

        Recentre(means, sizes, observations, centres);
        foreach (ref double level in levels)
            level += centres[^1];
        AddBetween(means, sizes, places, visits, groups, measured, between);
        SpreadComplete(bySize[visits - 1], groups, between[(packed * (visits - 1))..]);
        AddGroupsWithin(between, bySize, groups, packed, within);
        return new RandomInterceptMoments
        {
            Groups = groups,
            Parameters = groups + measured - 1,
            Subjects = subjects,
            Observations = observations,
            LargestMagnitude = largest,
            Within = within,
            Between = between,
            SubjectsBySize = bySize,
            Centres = centres[..^1],
            Origin = origin,
            Levels = levels,
        };
    }

    // The first observation is a good enough origin for a first step: what is left is of the size of the spread.
    private static void Origins(in VisitSample sample, int times, Span<double> origins)
    {
        origins.Clear();
        int covariates = sample.CovariateCount;
        for (int at = 0; at < sample.Values.Length; at++)
        {
            if (!IsObserved(sample, at))
                continue;
            if (times == 1)
                origins[0] = sample.Times[at % sample.Visits];
            sample.Covariates.Slice(at * covariates, covariates).CopyTo(origins[times..]);
            origins[^1] = sample.Values[at];
            return;
        }
    }

    private static void GroupMeans(in VisitSample sample, double origin, Span<double> levels, in Scratch.Frame frame)
    {
        Span<int> counts = frame.Integers(levels.Length);
        counts.Clear();
        levels.Clear();
        for (int at = 0; at < sample.Values.Length; at++)
        {
            if (!IsObserved(sample, at))
                continue;
            int group = levels.Length > 1 ? at % sample.Visits : 0;
            levels[group] += sample.Values[at] - origin;
            counts[group]++;
        }

        for (int group = 0; group < levels.Length; group++)
            levels[group] = counts[group] > 0 ? levels[group] / counts[group] : 0;
    }

    private static bool IsObserved(in VisitSample sample, int at)
    {
        if (double.IsNaN(sample.Values[at]))
            return false;
        int covariates = sample.CovariateCount;
        for (int q = 0; q < covariates; q++)
        {
            if (double.IsNaN(sample.Covariates[at * covariates + q]))
                return false;
        }

        return true;
    }

    private static int Read(
        in VisitSample sample, int subject, int times, ReadOnlySpan<double> origins, Span<double> rows, Span<int> present)
    {
        int size = 0, to = 0, covariates = sample.CovariateCount, visits = sample.Visits;
        for (int j = 0; j < visits; j++)
        {
            int at = subject * visits + j;
            if (!IsObserved(sample, at))
                continue;
            present[size++] = j;
            if (times == 1)
                rows[to++] = sample.Times[j] - origins[0];
            for (int q = 0; q < covariates; q++)
                rows[to++] = sample.Covariates[at * covariates + q] - origins[times + q];
            rows[to++] = sample.Values[at];
        }

        return size;
    }

    private static void TakeLevels(
        Span<double> rows, ReadOnlySpan<int> present, double origin, ReadOnlySpan<double> levels, ref double largest)
    {
        int measured = rows.Length / Math.Max(1, present.Length);
        for (int o = 0; o < present.Length; o++)
        {
            ref double value = ref rows[(o + 1) * measured - 1];
            largest = Math.Max(largest, Math.Abs(value));
            value = value - origin - levels[levels.Length > 1 ? present[o] : 0];
        }
    }

    private static void AddWithin(
        Span<double> rows, ReadOnlySpan<int> present, int groups, int measured, Span<double> mean, Span<double> within)
    {
        for (int column = 0; column < measured; column++)
        {
            double sum = 0;
            for (int at = column; at < rows.Length; at += measured)
                sum += rows[at];
            mean[column] = sum / present.Length;
        }

        for (int o = 0; o < present.Length; o++)
        {
            var row = rows.Slice(o * measured, measured);
            for (int column = 0; column < measured; column++)
            {
                double deviation = row[column] -= mean[column];
                int start = PackedSymmetric.Length(groups + column);
                if (groups > 1)
                    within[start + present[o]] += deviation;
                for (int other = 0; other <= column; other++)
                    within[start + groups + other] += deviation * row[other];
            }
        }
    }

    private static void Recentre(Span<double> means, ReadOnlySpan<int> sizes, int observations, Span<double> centres)
    {
        int measured = centres.Length;
        for (int column = 0; column < measured; column++)
        {
            double sum = 0;
            for (int i = 0; i < sizes.Length; i++)
            {
                if (sizes[i] > 0)
                    sum += sizes[i] * means[i * measured + column];
            }

            double centre = sum / observations;
            for (int i = 0; i < sizes.Length; i++)
                means[i * measured + column] -= centre;
            centres[column] += centre;
        }
    }

    // Turns the subjects' means into their sums on the way.
    private static void AddBetween(
        Span<double> means, ReadOnlySpan<int> sizes, ReadOnlySpan<int> places, int visits, int groups, int measured, Span<double> between)
    {
        int packed = PackedSymmetric.Length(groups + measured), placed = 0;
        for (int i = 0; i < sizes.Length; i++)
        {
            int size = sizes[i];
            if (size == 0)
                continue;
            var slice = between.Slice(packed * (size - 1), packed);
            var sums = means.Slice(i * measured, measured);
            var present = places.Slice(placed, size);
            placed += size;
            for (int column = 0; column < measured; column++)
            {
                double sum = sums[column] *= size;
                int start = PackedSymmetric.Length(groups + column);
                for (int other = 0; other <= column; other++)
                    slice[start + groups + other] += sum * sums[other];
                if (groups == 1)
                    slice[start] += size * sum;
                else if (size == visits)
                    slice[start] += sum;
                else
                    AddAt(slice[start..], present, sum);
            }

            if (groups == 1)
                slice[0] += (double)size * size;
            else if (size < visits)
                AddPlaces(slice, present);
        }
    }

    private static void AddAt(Span<double> row, ReadOnlySpan<int> present, double sum)
    {
        foreach (int place in present)
            row[place] += sum;
    }

    private static void AddPlaces(Span<double> slice, ReadOnlySpan<int> present)
    {
        for (int a = 0; a < present.Length; a++)
        {
            for (int b = 0; b <= a; b++)
                slice[PackedSymmetric.At(present[a], present[b])]++;
        }
    }

    // A complete subject adds the same to every indicator column: gathered in the first one, spread once.
    private static void SpreadComplete(int complete, int groups, Span<double> slice)
    {
        if (groups == 1)
            return;
        slice[..PackedSymmetric.Length(groups)].Fill(complete);
        for (int start = PackedSymmetric.Length(groups), row = groups; start < slice.Length; start += ++row)
            slice.Slice(start, groups).Fill(slice[start]);
    }

    private static void AddGroupsWithin(
        ReadOnlySpan<double> between, ReadOnlySpan<int> bySize, int groups, int packed, Span<double> within)
    {
        if (groups == 1)
            return;
        for (int size = 1; size <= bySize.Length; size++)
        {
            if (bySize[size - 1] == 0)
                continue;
            var slice = between.Slice(packed * (size - 1), packed);
            for (int row = 0, start = 0; row < groups; start += ++row)
            {
                for (int column = 0; column < row; column++)
                    within[start + column] -= slice[start + column] / size;
                within[start + row] += slice[start + row] - slice[start + row] / size;
            }
        }
    }
}
