using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Difference of two paired proportions, index minus reference, with three intervals.</summary>
/// <remarks>
/// For reports beside the McNemar tests, not for every endpoint of a screen. Sources: Newcombe (1998), Statistics in Medicine 17, 2635-2650;
/// Tango (1998), Statistics in Medicine 17, 891-908. Worked through in docs/methods/mcnemar.md.
/// </remarks>
public static class RiskDifference
{
    // Where the score has no spread at the estimate, so far beyond it the search begins; a proportion has no unit.
    private const double SmallStep = 1e-14;

    /// <summary>(b − c)/n; NaN without pairs.</summary>
    public static double Of(in PairedTable table) => ((double)table.IndexOnly - table.ReferenceOnly) / table.Pairs;

    /// <summary>Newcombe's square-and-add interval with the correlation corrected for continuity: his method 10.</summary>
    /// <remarks>The Wilson limits of the two proportions are joined; a positive ad − bc is reduced by n/2, at least to 0, before it enters the correlation.</remarks>
    /// <param name="table">The counted pairs; without pairs there is no interval.</param>
    /// <param name="options">Sides and confidence.</param>
    public static Interval SquareAndAdd(in PairedTable table, TestOptions options)
    {
        double product = CrossProduct(table);
        return SquareAndAdd(table, product > 0 ? Math.Max(0, product - (0.5 * table.Pairs)) : product, options);
    }

    /// <summary>Newcombe's square-and-add interval with the plain correlation: his method 8.</summary>
    /// <param name="table">The counted pairs; without pairs there is no interval.</param>
    /// <param name="options">Sides and confidence.</param>
    public static Interval SquareAndAddUncorrected(in PairedTable table, TestOptions options) =>
        SquareAndAdd(table, CrossProduct(table), options);

    /// <summary>Tango's score interval: the differences that the score test does not reject.</summary>
    /// <remarks>At a difference of 0 the score test is McNemar's, so the interval excludes 0 exactly when that p &lt; 1 − confidence.</remarks>
    /// <param name="table">The counted pairs; without pairs there is no interval.</param>
    /// <param name="options">Sides and confidence.</param>
    public static Interval Score(in PairedTable table, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        if (table.Pairs == 0)
            return Interval.None;
        double z = StandardNormal.UpperQuantile(options.TailShare);
        double b = table.IndexOnly, c = table.ReferenceOnly;
        return Interval.Pointing(-UpperScoreLimit(c, b, table.Pairs, z), UpperScoreLimit(b, c, table.Pairs, z), options.Sides);
    }

    private static double CrossProduct(in PairedTable t) =>
        ((double)t.Both * t.Neither) - ((double)t.IndexOnly * t.ReferenceOnly);

    private static Interval SquareAndAdd(in PairedTable table, double crossProduct, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        if (table.Pairs == 0)
            return Interval.None;
        double n = table.Pairs, z = StandardNormal.UpperQuantile(options.TailShare);
        double index = (double)table.Both + table.IndexOnly, reference = (double)table.Both + table.ReferenceOnly;
        double margins = index * (n - index) * reference * (n - reference);
        double correlation = margins == 0 ? 0 : crossProduct / Math.Sqrt(margins);
        var first = WilsonDistances(index, n, z);
        var second = WilsonDistances(reference, n, z);
        double difference = Of(table);
        return Interval.Pointing(
            difference - Joined(first.Down, second.Up, correlation), difference + Joined(first.Up, second.Down, correlation), options.Sides);
    }

    private static double Joined(double first, double second, double correlation) =>
        Math.Sqrt((first * first) - (2 * correlation * first * second) + (second * second));

    // How far Wilson's limits lie below and above the proportion. Source: Wilson (1927), JASA 22, 209-212.
    private static (double Down, double Up) WilsonDistances(double successes, double n, double z)
    {
        double p = successes / n;
        double half = z * Math.Sqrt((z * z) + (4 * n * p * (1 - p)));
        double middle = (2 * n * p) + (z * z), scale = 2 * (n + (z * z));
        return (p - ((middle - half) / scale), ((middle + half) / scale) - p);
    }

    // The difference at which the score statistic has fallen to −z: from the estimate up to 1.
    private static double UpperScoreLimit(double b, double c, double n, double z)
    {
        double estimate = (b - c) / n;
        if (z == 0 || Excess(b, c, n, z, 1) <= 0)
            return z == 0 ? estimate : 1;
        // Where all pairs are of one kind the score has no spread at the estimate itself; a step beyond it has.
        double low = Excess(b, c, n, z, estimate) < 0 ? estimate : estimate + SmallStep;
        double high = 1;
        // Halves until the middle is one of the ends; the score rises through zero once between them.
        double middle = low + ((high - low) / 2);
        while (middle > low && middle < high)
        {
            if (Excess(b, c, n, z, middle) < 0)
                low = middle;
            else
                high = middle;
            middle = low + ((high - low) / 2);
        }

        return middle;
    }

    // The score's distance beyond z, in pairs.
    private static double Excess(double b, double c, double n, double z, double difference)
    {
        double lacking = (n * difference) - (b - c);
        return lacking - (z * Math.Sqrt(n * Math.Max(0, (2 * ReferenceOnlyShare(b, c, n, difference)) + (difference * (1 - difference)))));
    }

    // Most likely probability of a pair of the kind c where the difference of proportions is fixed.
    private static double ReferenceOnlyShare(double b, double c, double n, double difference)
    {
        double linear = ((2 * n) - b + c) * difference - b - c;
        double root = Math.Sqrt(Math.Max(0, (linear * linear) + (8 * n * c * difference * (1 - difference))));
        // Of the two forms of the root the one without cancellation.
        return linear <= 0 ? (root - linear) / (4 * n) : 2 * c * difference * (1 - difference) / (root + linear);
    }
}
