using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Sets;

/// <summary>The conditional likelihood of all sets in which one role has a single member (1:M and N:1), in closed form.</summary>
/// <remarks>
/// <para>In a set the member alone in its role is the chosen one. With D = column value of another member minus that of the
/// chosen one (sign turned where the chosen one is the reference), the set's likelihood is 1 / (1 + Σ exp(β·D)).</para>
/// <para>Layout: sets with equally many others stand together, four to a tile, one a lane; in a tile the others follow one
/// another, each with its columns. Empty lanes of a last tile hold D = 0: they add nothing to the derivatives, and their
/// ln(1 + others) is taken off again. The order of every sum is given by the sets alone, not by the machine.</para>
/// </remarks>
internal readonly ref struct SingleChoices
{
    private const int Lanes = 4;

    // A product of weight sums is logged before it could pass 2^1000.
    private const double BitsBeforeLogging = 1000;

    private readonly ReadOnlySpan<double> _tiles;
    private readonly ReadOnlySpan<int> _setsByOthers;
    private readonly Span<double> _weights;
    private readonly Span<double> _sums;
    private readonly int _columns;

    private SingleChoices(ReadOnlySpan<double> tiles, ReadOnlySpan<int> setsByOthers, Span<double> weights, Span<double> sums, int columns)
    {
        _tiles = tiles;
        _setsByOthers = setsByOthers;
        _weights = weights;
        _sums = sums;
        _columns = columns;
    }

    /// <summary>True for a set that this form can take.</summary>
    public static bool Takes(int members, int index) => index == 1 || members - index == 1;

    /// <summary>Lays the sets out.</summary>
    /// <param name="sets">The sets; those it does not take are passed over.</param>
    /// <param name="design">Columns one after another, one value a member.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public static SingleChoices Of(in SetSample sets, ReadOnlySpan<double> design, int columns, in Scratch.Frame frame)
    {
        ReadOnlySpan<int> starts = sets.Starts;
        int largest = 0;
        for (int s = 0; s < sets.Sets; s++)
            largest = Math.Max(largest, OthersIn(sets, s));
        Span<int> setsByOthers = frame.Integers(largest + 1);
        setsByOthers.Clear();
        for (int s = 0; s < sets.Sets; s++)
            setsByOthers[OthersIn(sets, s)]++;
        setsByOthers[0] = 0;

        Span<int> places = frame.Integers(largest + 1);
        int length = 0;
        for (int others = 1; others <= largest; others++)
        {
            places[others] = length;
            length += TilesOf(setsByOthers[others]) * others * columns * Lanes;
        }

        Span<double> tiles = frame.Doubles(length);
        for (int others = 1; others <= largest; others++)
        {
            if (setsByOthers[others] % Lanes != 0)
                tiles.Slice(places[others] + setsByOthers[others] / Lanes * others * columns * Lanes, others * columns * Lanes).Clear();
        }

        Span<int> filled = frame.Integers(largest + 1);
        filled.Clear();
        for (int s = 0; s < sets.Sets; s++)
        {
            int others = OthersIn(sets, s);
            if (others == 0)
                continue;
            int slot = filled[others]++;
            int at = places[others] + (slot / Lanes * others * columns * Lanes) + (slot % Lanes);
            bool indexIsAlone = sets.IndexCounts[s] == 1;
            Place(tiles[at..], design, columns, sets.Members, starts[s], starts[s + 1], indexIsAlone);
        }

        return new SingleChoices(
            tiles,
            setsByOthers,
            frame.Doubles(largest * Lanes),
            frame.Doubles((columns + (columns * (columns + 1) / 2) + columns) * Lanes),
            columns);
    }

    /// <summary>Adds the log-likelihood and its derivatives at <paramref name="beta"/>.</summary>
    /// <param name="beta">One coefficient a column.</param>
    /// <param name="gradient">First derivatives, added to.</param>
    /// <param name="information">Minus the second derivatives, columns × columns, lower triangle added to.</param>
    /// <returns>The log-likelihood of these sets.</returns>
    public double AddTo(ReadOnlySpan<double> beta, Span<double> gradient, Span<double> information)
    {
        double logLikelihood = 0;
        ReadOnlySpan<Vector256<double>> rest = MemoryMarshal.Cast<double, Vector256<double>>(_tiles);
        for (int others = 1; others < _setsByOthers.Length; others++)
        {
            int count = _setsByOthers[others];
            if (count == 0)
                continue;
            int vectors = TilesOf(count) * others * _columns;
            logLikelihood += _columns == 1
                ? AddOneColumn(rest[..vectors], others, beta[0], gradient, information)
                : AddColumns(rest[..vectors], others, beta, gradient, information);
            int empty = (TilesOf(count) * Lanes) - count;
            if (empty > 0)
                logLikelihood += empty * NaturalLogarithm.Of(others + 1);
            rest = rest[vectors..];
        }

        return logLikelihood;
    }

    /// <summary>Largest and smallest β·D over all members not chosen; both 0 where there are none.</summary>
    public (double Smallest, double Largest) RangeAlong(ReadOnlySpan<double> direction)
    {
        double smallest = 0, largest = 0;
        int stride = _columns * Lanes;
        for (int at = 0; at < _tiles.Length; at += stride)
        {
            for (int lane = 0; lane < Lanes; lane++)
            {
                double along = 0;
                for (int c = 0; c < _columns; c++)
                    along += direction[c] * _tiles[at + (c * Lanes) + lane];
                smallest = Math.Min(smallest, along);
                largest = Math.Max(largest, along);
            }
        }

        return (smallest, largest);
    }

    /// <summary>The log-likelihood of a single column at infinity; see <see cref="ConditionalLikelihood.LimitAlong"/>.</summary>
    public double LimitAlong(double direction)
    {
        double logLikelihood = 0;
        ReadOnlySpan<double> rest = _tiles;
        for (int others = 1; others < _setsByOthers.Length; others++)
        {
            for (int set = 0; set < _setsByOthers[others]; set++)
            {
                int level = 1, at = (set / Lanes * others * Lanes) + (set % Lanes);
                for (int other = 0; other < others; other++)
                    level += direction * rest[at + (other * Lanes)] == 0 ? 1 : 0;
                logLikelihood -= NaturalLogarithm.Of(level);
            }

            rest = rest[(TilesOf(_setsByOthers[others]) * others * Lanes)..];
        }

        return logLikelihood;
    }

    private static int OthersIn(in SetSample sets, int set)
    {
        int members = sets.Starts[set + 1] - sets.Starts[set];
        return Takes(members, sets.IndexCounts[set]) ? members - 1 : 0;
    }

    private static int TilesOf(int sets) => (sets + Lanes - 1) / Lanes;

    private static void Place(
        Span<double> target, ReadOnlySpan<double> design, int columns, int members, int from, int to, bool indexIsAlone)
    {
        int chosen = indexIsAlone ? from : to - 1;
        int first = indexIsAlone ? from + 1 : from;
        int others = to - from - 1;
        double sign = indexIsAlone ? 1 : -1;
        for (int c = 0; c < columns; c++)
        {
            ReadOnlySpan<double> column = design.Slice(c * members, members);
            double origin = column[chosen];
            for (int other = 0; other < others; other++)
                target[((other * columns) + c) * Lanes] = sign * (column[first + other] - origin);
        }
    }

    private static double AddOneColumn(
        ReadOnlySpan<Vector256<double>> tiles, int others, double beta, Span<double> gradient, Span<double> information)
    {
        var shifts = Vector256<double>.Zero;
        var slopes = Vector256<double>.Zero;
        var curvatures = Vector256<double>.Zero;
        var product = Vector256<double>.One;
        double logs = 0, bits = 0, bitsATile = Math.ILogB(others + 1) + 1;
        for (int at = 0; at < tiles.Length; at += others)
        {
            ReadOnlySpan<Vector256<double>> tile = tiles.Slice(at, others);
            var shift = Vector256<double>.Zero;
            foreach (Vector256<double> difference in tile)
                shift = Vector256.MaxNative(shift, difference * beta);
            Vector256<double> total = Exponential.Of(-shift);
            var first = Vector256<double>.Zero;
            var second = Vector256<double>.Zero;
            foreach (Vector256<double> difference in tile)
            {
                Vector256<double> weight = Exponential.Of(difference * beta - shift);
                Vector256<double> moment = weight * difference;
                total += weight;
                first += moment;
                second += moment * difference;
            }

            Vector256<double> share = Vector256<double>.One / total;
            Vector256<double> mean = first * share;
            slopes += mean;
            curvatures += second * share - mean * mean;
            shifts += shift;
            product *= total;
            bits += bitsATile;
            if (bits > BitsBeforeLogging)
            {
                logs += LogOf(product);
                product = Vector256<double>.One;
                bits = 0;
            }
        }

        gradient[0] -= SumOf(slopes);
        information[0] += SumOf(curvatures);
        return -(SumOf(shifts) + logs + LogOf(product));
    }

    private double AddColumns(
        ReadOnlySpan<Vector256<double>> tiles, int others, ReadOnlySpan<double> beta, Span<double> gradient, Span<double> information)
    {
        int columns = _columns;
        Span<Vector256<double>> sums = MemoryMarshal.Cast<double, Vector256<double>>(_sums);
        Span<Vector256<double>> slopes = sums[..columns];
        Span<Vector256<double>> means = sums.Slice(columns, columns);
        Span<Vector256<double>> curvatures = sums[(2 * columns)..];
        Span<Vector256<double>> weights = MemoryMarshal.Cast<double, Vector256<double>>(_weights)[..others];
        slopes.Clear();
        curvatures.Clear();
        var shifts = Vector256<double>.Zero;
        var product = Vector256<double>.One;
        double logs = 0, bits = 0, bitsATile = Math.ILogB(others + 1) + 1;
        for (int at = 0; at < tiles.Length; at += others * columns)
        {
            ReadOnlySpan<Vector256<double>> tile = tiles.Slice(at, others * columns);
            Vector256<double> shift = Weigh(tile, beta, weights);
            Vector256<double> total = Exponential.Of(-shift);
            foreach (Vector256<double> weight in weights)
                total += weight;
            Vector256<double> share = Vector256<double>.One / total;
            AddMoments(tile, weights, share, means, curvatures);
            for (int c = 0; c < columns; c++)
                slopes[c] += means[c];
            shifts += shift;
            product *= total;
            bits += bitsATile;
            if (bits > BitsBeforeLogging)
            {
                logs += LogOf(product);
                product = Vector256<double>.One;
                bits = 0;
            }
        }

        for (int row = 0, entry = 0; row < columns; row++)
        {
            gradient[row] -= SumOf(slopes[row]);
            for (int column = 0; column <= row; column++)
                information[(row * columns) + column] += SumOf(curvatures[entry++]);
        }

        return -(SumOf(shifts) + logs + LogOf(product));
    }

    // Leaves exp(β·D − shift) in weights; shift is the largest β·D, at least 0, so that nothing overflows.
    private static Vector256<double> Weigh(
        ReadOnlySpan<Vector256<double>> tile, ReadOnlySpan<double> beta, Span<Vector256<double>> weights)
    {
        int columns = beta.Length;
        var shift = Vector256<double>.Zero;
        for (int other = 0; other < weights.Length; other++)
        {
            var along = Vector256<double>.Zero;
            for (int c = 0; c < columns; c++)
                along += tile[(other * columns) + c] * beta[c];
            weights[other] = along;
            shift = Vector256.MaxNative(shift, along);
        }

        for (int other = 0; other < weights.Length; other++)
            weights[other] = Exponential.Of(weights[other] - shift);
        return shift;
    }

    private static void AddMoments(
        ReadOnlySpan<Vector256<double>> tile,
        ReadOnlySpan<Vector256<double>> weights,
        Vector256<double> share,
        Span<Vector256<double>> means,
        Span<Vector256<double>> curvatures)
    {
        int columns = means.Length;
        for (int row = 0, entry = 0; row < columns; row++)
        {
            var mean = Vector256<double>.Zero;
            for (int other = 0; other < weights.Length; other++)
                mean += weights[other] * tile[(other * columns) + row];
            means[row] = mean * share;
            for (int column = 0; column <= row; column++, entry++)
            {
                var product = Vector256<double>.Zero;
                for (int other = 0; other < weights.Length; other++)
                    product += weights[other] * tile[(other * columns) + row] * tile[(other * columns) + column];
                curvatures[entry] += product * share - means[row] * means[column];
            }
        }
    }

    private static double SumOf(Vector256<double> lanes) => lanes[0] + lanes[1] + (lanes[2] + lanes[3]);

    private static double LogOf(Vector256<double> lanes) =>
        NaturalLogarithm.Of(lanes[0]) + NaturalLogarithm.Of(lanes[1]) + (NaturalLogarithm.Of(lanes[2]) + NaturalLogarithm.Of(lanes[3]));
}
