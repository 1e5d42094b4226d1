using System.Globalization;
using MatchedSuite.Statistics;

namespace MatchedSuite.Reporting;

/// <summary>Numbers as a person reads them; files keep all digits.</summary>
public static class NumberText
{
    private const double SmallestPlain = 0.001;

    /// <summary>A measured quantity with four significant digits; a dash where there is none.</summary>
    public static string Quantity(double value)
    {
        if (double.IsNaN(value))
            return "–";
        if (double.IsInfinity(value))
            return value > 0 ? "∞" : "−∞";
        double size = Math.Abs(value);
        if (size != 0 && size is < 1e-3 or >= 1e6)
            return value.ToString("0.###e+0", CultureInfo.InvariantCulture);
        int decimals = size == 0 ? 0 : Math.Clamp(3 - (int)Math.Floor(Math.Log10(size)), 0, 6);
        return value.ToString($"F{decimals}", CultureInfo.InvariantCulture);
    }

    /// <summary>A p-value: three decimals or more, powers of ten below 0.001, also where the number itself underflows.</summary>
    public static string P(Probability p)
    {
        if (p.IsMissing)
            return "–";
        if (p.Value >= SmallestPlain)
            return p.Value.ToString(p.Value >= 0.0995 ? "0.000" : "0.0000", CultureInfo.InvariantCulture);
        if (double.IsNegativeInfinity(p.Log10))
            return "0";
        double exponent = Math.Floor(p.Log10);
        double digits = Math.Round(Math.Pow(10, p.Log10 - exponent), 1);
        if (digits >= 10)
        {
            digits = 1;
            exponent++;
        }

        return string.Create(CultureInfo.InvariantCulture, $"{digits:0.0}e{exponent:0}");
    }

    /// <summary>A count with thousands apart.</summary>
    public static string Count(long value) => value.ToString("N0", CultureInfo.InvariantCulture);

    /// <summary>A share as per cent.</summary>
    public static string Percent(double share) => (100 * share).ToString("0.###", CultureInfo.InvariantCulture) + " %";
}
