namespace MatchedSuite.Statistics.Distributions;

/// <summary>The first two derivatives of log Γ, and the inverse of the second.</summary>
/// <remarks>
/// The recurrence carries the argument up to where the asymptotic series holds: Abramowitz and Stegun (1964), 6.3.18, 6.4.12.
/// Inverse: Newton's method on 1/ψ', which is convex and nearly linear: Smyth (2004), Statistical Applications in Genetics
/// and Molecular Biology 3:3, appendix.
/// </remarks>
internal static class PolyGamma
{
    // From here eight terms of either series reach the last digit of a double.
    private const double SeriesFrom = 12;

    // B(2k)/(2k) for ψ, and B(2k) for ψ'; B are the Bernoulli numbers 1/6, −1/30, 1/42, −1/30, 5/66, −691/2730, 7/6, −3617/510.
    private static readonly double[] Bernoulli = [1.0 / 6, -1.0 / 30, 1.0 / 42, -1.0 / 30, 5.0 / 66, -691.0 / 2730, 7.0 / 6, -3617.0 / 510];

    /// <summary>ψ(x) − log x for x &gt; 0: negative, and near −1/(2x) for large x, where ψ alone would lose its digits to the logarithm.</summary>
    public static double DigammaLessLog(double x)
    {
        double recurrence = 0, shifted = x;
        while (shifted < SeriesFrom)
            recurrence -= 1 / shifted++;
        double square = 1 / (shifted * shifted), series = 0;
        for (int k = Bernoulli.Length; k >= 1; k--)
            series = (series + (Bernoulli[k - 1] / (2 * k))) * square;
        double moved = shifted == x ? 0 : Math.Log(shifted / x);
        return recurrence + moved - (0.5 / shifted) - series;
    }

    /// <summary>ψ'(x) for x &gt; 0.</summary>
    public static double Trigamma(double x)
    {
        double recurrence = 0, shifted = x;
        while (shifted < SeriesFrom)
        {
            recurrence += 1 / (shifted * shifted);
            shifted++;
        }

        double square = 1 / (shifted * shifted), series = 0;
        for (int k = Bernoulli.Length; k >= 1; k--)
            series = (series + Bernoulli[k - 1]) * square;
        return recurrence + ((1 + (0.5 / shifted) + series) / shifted);
    }

    /// <summary>The x &gt; 0 with ψ'(x) = <paramref name="value"/>, for a positive, finite value.</summary>
    public static double InverseTrigamma(double value)
    {
        Require.PositiveFinite(value);
        // ψ'(x) lies between 1/x + 1/(2x²) and 1/x + 1/x².
        double x = 0.5 + (1 / value);
        if (value > 1e7)
            x = 1 / Math.Sqrt(value);
        for (int i = 0; i < 50; i++)
        {
            double trigamma = Trigamma(x);
            double step = trigamma * (1 - (trigamma / value)) / TrigammaSlope(x);
            x += step;
            if (Math.Abs(step) <= 1e-15 * x)
                break;
        }

        return x;
    }

    // ψ''(x); it steers Newton's steps, so the last digits do not matter.
    private static double TrigammaSlope(double x)
    {
        double recurrence = 0, shifted = x;
        while (shifted < SeriesFrom)
        {
            recurrence -= 2 / (shifted * shifted * shifted);
            shifted++;
        }

        double square = 1 / (shifted * shifted), series = 0;
        for (int k = Bernoulli.Length; k >= 1; k--)
            series = (series + (((2 * k) + 1) * Bernoulli[k - 1])) * square;
        return recurrence - (square * (1 + (1 / shifted) + series));
    }
}
