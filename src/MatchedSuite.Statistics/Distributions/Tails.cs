namespace MatchedSuite.Statistics.Distributions;

/// <summary>How the two tails of a statistic become one p-value.</summary>
public static class Tails
{
    // Above this a product of double factors keeps all its digits; below it the logarithm carries the result.
    private const double LogarithmOfSafeSize = -660;

    /// <summary>log 10, between natural and decimal logarithms.</summary>
    internal static readonly double LogarithmOfTen = Math.Log(10);

    /// <summary>
    /// The p-value for the alternative asked: <see cref="Sides.Greater"/> takes the upper tail, <see cref="Sides.Less"/> the
    /// lower, <see cref="Sides.Two"/> twice the smaller, at most 1. A missing tail makes a missing p.
    /// </summary>
    /// <param name="sides">Direction of the alternative.</param>
    /// <param name="lower">Probability of the observed value or a smaller one.</param>
    /// <param name="upper">Probability of the observed value or a larger one.</param>
    public static Probability ForSides(Sides sides, Probability lower, Probability upper) => sides switch
    {
        Sides.Greater => upper,
        Sides.Less => lower,
        Sides.Two => Probability.Min(lower, upper).Times(2),
        _ => throw new ArgumentOutOfRangeException(nameof(sides), sides, "No such direction."),
    };

    /// <summary>The probability exp(<paramref name="logarithm"/>) · <paramref name="factor"/>, with digits as long as a double has them.</summary>
    internal static Probability Scaled(double logarithm, double factor)
    {
        if (logarithm > LogarithmOfSafeSize)
        {
            double value = Math.Exp(logarithm) * factor;
            if (value > 1e-285)
                return new Probability(value, Math.Log10(value));
        }
        double total = logarithm + Math.Log(factor);
        return new Probability(Math.Exp(total), total / LogarithmOfTen);
    }

    /// <summary>One minus a probability that is not close to 1, the logarithm exact also where the answer is close to 1.</summary>
    internal static Probability Complement(double value) => new(1 - value, LogOnePlus.Of(-value) / LogarithmOfTen);

    /// <summary>Natural logarithm of a probability from the better of its two forms.</summary>
    internal static double NaturalLog(Probability p) => p.Value > 1e-285 ? Math.Log(p.Value) : p.Log10 * LogarithmOfTen;

    /// <summary>A plain number taken as a probability; throws where it is none. NaN passes.</summary>
    internal static Probability Checked(double p)
    {
        if (p is < 0 or > 1)
            throw new ArgumentOutOfRangeException(nameof(p), p, "A probability lies between 0 and 1.");
        return Probability.Of(p);
    }
}
