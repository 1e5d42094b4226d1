using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Sets;

/// <summary>The conditional likelihood of all sets in which one role has a single member (1:M and N:1), in closed form.</summary>
/// <remarks>
/// With D as laid out by <see cref="SingleChoiceTiles"/>, a set's likelihood is 1 / (1 + Σ exp(β·D)). Four sets are taken at a
/// time; the order of every sum is given by the sets alone, not by the machine. Empty lanes hold D = 0: they add nothing to the
/// derivatives, and their ln(1 + others) is taken off again.
/// </remarks>
internal readonly ref struct SingleChoices
{
    private const int Lanes = SingleChoiceTiles.Lanes;

    // A product of weight sums is logged before it could pass 2^1000.
    private const double BitsBeforeLogging = 1000;

    private readonly SingleChoiceTiles _layout;
    private readonly Span<double> _weights;
    private readonly Span<double> _sums;

    /// <summary>Takes the layout and working memory.</summary>
    public SingleChoices(SingleChoiceTiles layout, in Scratch.Frame frame)
    {
        int columns = layout.Columns;
        _layout = layout;
        _weights = frame.Doubles(layout.SetsByOthers.Length * Lanes);
        _sums = frame.Doubles(((2 * columns) + (columns * (columns + 1) / 2)) * Lanes);
    }

    /// <summary>Adds the log-likelihood and its derivatives at <paramref name="beta"/>.</summary>
    /// <param name="beta">One coefficient a column.</param>
    /// <param name="gradient">First derivatives, added to.</param>
    /// <param name="information">Minus the second derivatives, columns × columns, lower triangle added to.</param>
    /// <returns>The log-likelihood of these sets.</returns>
    public double AddTo(ReadOnlySpan<double> beta, Span<double> gradient, Span<double> information)
    {
        double logLikelihood = 0;
        ReadOnlySpan<Vector256<double>> rest = MemoryMarshal.Cast<double, Vector256<double>>(_layout.Tiles);
        int columns = _layout.Columns;
        for (int others = 1; others < _layout.SetsByOthers.Length; others++)
        {
            int count = _layout.SetsByOthers[others];
            if (count == 0)
                continue;
            int vectors = SingleChoiceTiles.TilesOf(count) * others * columns;
            logLikelihood += columns == 1
                ? AddOneColumn(rest[..vectors], others, beta[0], gradient, information)
                : AddColumns(rest[..vectors], others, beta, gradient, information);
            int empty = (SingleChoiceTiles.TilesOf(count) * Lanes) - count;
            if (empty > 0)
                logLikelihood += empty * NaturalLogarithm.Of(others + 1);
            rest = rest[vectors..];
        }

        return logLikelihood;
    }

    // Code compiled ahead holds no 256-bit vectors, and the first compilation at run time leaves them slow: these are compiled once, well.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
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
        int columns = beta.Length;
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
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
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

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
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
