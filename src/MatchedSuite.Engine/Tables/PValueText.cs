using System.Globalization;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Tables;

/// <summary>p-values as text, also those that no double can hold: 1e-400 keeps its logarithm.</summary>
public static class PValueText
{
    private const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;

    // More digits do not change the logarithm of a double's precision.
    private const int DigitsKept = 18;

    private const double SmallestPlain = 1e-290;

    /// <summary>Reads a p-value.</summary>
    /// <param name="text">A decimal number with a point, such as 0.03 or 1.2e-400.</param>
    /// <param name="p">The p-value; missing where the text is none.</param>
    public static PValueFault Read(string text, out Probability p)
    {
        p = Probability.Missing;
        if (!double.TryParse(text, Style, CultureInfo.InvariantCulture, out double value) || !double.IsFinite(value))
            return PValueFault.NotANumber;
        if (value > 1)
            return PValueFault.AboveOne;
        Probability size = Math.Abs(value) >= SmallestPlain ? Probability.Of(Math.Abs(value)) : Tiny(text, Math.Abs(value));
        if (text.StartsWith('-') && size != Probability.Zero)
            return PValueFault.Negative;
        p = size;
        return PValueFault.None;
    }

    /// <summary>Writes a p-value: the shortest text that reads back as the same double, below their range mantissa and exponent; empty where missing.</summary>
    public static string Of(Probability p)
    {
        if (p.IsMissing)
            return "";
        if (p.Value >= SmallestPlain || double.IsNegativeInfinity(p.Log10))
            return p.Value.ToString("R", CultureInfo.InvariantCulture);
        double exponent = Math.Floor(p.Log10);
        string mantissa = Math.Pow(10, p.Log10 - exponent).ToString("0.############", CultureInfo.InvariantCulture);
        if (mantissa == "10")
            (mantissa, exponent) = ("1", exponent + 1);
        return string.Create(CultureInfo.InvariantCulture, $"{mantissa}E{exponent:0}");
    }

    // The first digits that are not zero, and the power of ten that they stand at.
    private static Probability Tiny(string text, double value)
    {
        int end = text.AsSpan().IndexOfAny('e', 'E');
        ReadOnlySpan<char> mantissa = text.AsSpan(0, end < 0 ? text.Length : end).TrimStart("+-");
        long exponent = end < 0 ? 0 : long.TryParse(text.AsSpan(end + 1), Style, CultureInfo.InvariantCulture, out long written) ? written : long.MinValue / 2;
        int point = mantissa.IndexOf('.');
        int whole = point < 0 ? mantissa.Length : point;
        double digits = 0;
        int used = 0, first = -1, place = 0;
        foreach (char letter in mantissa)
        {
            if (letter == '.')
                continue;
            if (first < 0 && letter != '0')
                first = place;
            if (first >= 0 && used < DigitsKept)
            {
                digits = digits * 10 + (letter - '0');
                used++;
            }

            place++;
        }

        if (first < 0)
            return Probability.Zero;
        double log10 = Math.Log10(digits) + (whole - first - used) + exponent;
        return new Probability(value, log10);
    }
}
