using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Everything the likelihood of a random-intercept model needs to know of one endpoint.</summary>
/// <remarks>
/// <para>Columns: the constant, an indicator of each visit but the first (none for a line), the measured columns of
/// <see cref="RandomInterceptColumns"/>, the endpoint last; order = parameters + 1. Cross-products are split into those
/// within subjects and, by the number m of observations a subject has, those of the subjects' sums. With the variance ratio
/// λ the weighted cross-products are W + Σ S_m / (m(1 + λm)): only positive parts, so nothing cancels, and the constant, which
/// does not vary within subjects, has exact zeros in W, so that a large λ does no harm either.</para>
/// <para>The endpoint is in units of <see cref="Scale"/>.</para>
/// </remarks>
internal readonly ref struct RandomInterceptMoments
{
    /// <summary>Levels that the model has: visits, or 1 for a line. The constant and the indicators are as many columns.</summary>
    public int Groups { get; private init; }

    /// <summary>Fixed effects: group columns and measured columns without the endpoint.</summary>
    public int Parameters { get; private init; }

    /// <summary>Observations of the group that has the fewest.</summary>
    public int FewestInGroup { get; private init; }

    /// <summary>Subjects with at least one observation.</summary>
    public int Subjects { get; private init; }

    /// <summary>Observations with value and covariates.</summary>
    public int Observations { get; private init; }

    /// <summary>The largest absolute value of the endpoint in its own unit, for judging what is rounding.</summary>
    public double LargestMagnitude { get; private init; }

    /// <summary>Endpoint units that are 1 here; a power of two.</summary>
    public double Scale { get; private init; }

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

    /// <summary>What was taken off every value of the endpoint, in its own unit.</summary>
    public double Origin { get; private init; }

    /// <summary>What was taken off the endpoint beside <see cref="Origin"/>: of all groups, then more of each further one; in its own unit.</summary>
    public ReadOnlySpan<double> Levels { get; private init; }

    /// <summary>Gathers the moments of a sample.</summary>
    public static RandomInterceptMoments Of(scoped in VisitSample sample, VisitTerm term, in Scratch.Frame frame)
    {
        var columns = RandomInterceptColumns.Of(sample, term, frame);
        int visits = sample.Visits, groups = columns.Groups, measured = columns.Measured;
        int packed = PackedSymmetric.Length(groups + measured);
        Span<double> within = frame.Doubles(packed), between = frame.Doubles(packed * visits);
        Span<int> bySize = frame.Integers(visits), sizes = frame.Integers(sample.Subjects), places = frame.Integers(sample.Values.Length);
        Span<double> means = frame.Doubles(sample.Subjects * measured), rows = frame.Doubles(visits * measured);
        within.Clear();
        between.Clear();
        bySize.Clear();

        int observations = 0, subjects = 0;
        for (int i = 0; i < sample.Subjects; i++)
        {
            Span<int> present = places.Slice(observations, visits);
            int size = columns.Read(i, rows, present, out double level);
            sizes[i] = size;
            if (size == 0)
                continue;
            subjects++;
            observations += size;
            bySize[size - 1]++;
            var mean = means.Slice(i * measured, measured);
            AddWithin(rows[..(size * measured)], present[..size], groups, measured, mean, within);
            mean[^1] += level;
        }

        Span<double> centres = frame.Doubles(measured);
        Recentre(means, sizes, observations, centres);
        AddBetween(means, sizes, places, visits, groups, measured, between);
        SpreadComplete(bySize[visits - 1], groups, between[(packed * (visits - 1))..]);
        AddGroupsWithin(between, bySize, groups, packed, within);
        if (groups > 1)
            PutConstantFirst(between, within, groups, frame.Doubles(groups + measured));
        columns.Levels[0] += centres[^1] * columns.Scale;
        for (int column = 0; column < measured - 1; column++)
            centres[column] += columns.Origins[column];
        return new RandomInterceptMoments
        {
            Groups = groups,
            Parameters = groups + measured - 1,
            FewestInGroup = columns.FewestInGroup,
            Subjects = subjects,
            Observations = observations,
            LargestMagnitude = columns.LargestMagnitude,
            Scale = columns.Scale,
            Within = within,
            Between = between,
            SubjectsBySize = bySize,
            Centres = centres[..^1],
            Origin = columns.Origins[^1],
            Levels = columns.Levels,
        };
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
            centres[column] = centre;
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

    // The indicators add up to the constant: it takes the place of the first.
    private static void PutConstantFirst(Span<double> between, Span<double> within, int groups, Span<double> sums)
    {
        for (int start = 0; start < between.Length; start += within.Length)
        {
            var slice = between.Slice(start, within.Length);
            for (int row = 0; row < sums.Length; row++)
            {
                sums[row] = 0;
                for (int group = 0; group < groups; group++)
                    sums[row] += slice[PackedSymmetric.At(row, group)];
            }

            double all = 0;
            for (int group = 0; group < groups; group++)
                all += sums[group];
            for (int row = 1; row < sums.Length; row++)
                slice[PackedSymmetric.At(row, 0)] = sums[row];
            slice[0] = all;
        }

        for (int row = 0; row < sums.Length; row++)
            within[PackedSymmetric.At(row, 0)] = 0;
    }
}
