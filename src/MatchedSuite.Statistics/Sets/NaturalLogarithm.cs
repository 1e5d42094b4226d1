namespace MatchedSuite.Statistics.Sets;

/// <summary>The natural logarithm with the same bits on every machine, and of long products without overflow.</summary>
/// <remarks>
/// x = 2^n·m with m between √½ and √2; ln m = 2·artanh(s), s = (m − 1)/(m + 1), by its power series (|s| below 0.172, so eleven
/// terms leave less than 1e-17). Error about 2 units in the last place.
/// </remarks>
internal static class NaturalLogarithm
{
    private const double OctaveHigh = 0.6931471803691238;
    private const double OctaveLow = 1.9082149292705877e-10;
    private const long MantissaBits = (1L << 52) - 1;
    private const long One = 1023L << 52;

    /// <summary>ln of a positive, normal number.</summary>
    public static double Of(double x)
    {
        long bits = BitConverter.DoubleToInt64Bits(x);
        long exponent = (bits >> 52) - 1023;
        double m = BitConverter.Int64BitsToDouble((bits & MantissaBits) | One);
        if (m > 1.4142135623730951)
        {
            m *= 0.5;
            exponent++;
        }

        double s = (m - 1) / (m + 1);
        double square = s * s;
        double series = 0;
        for (int odd = 21; odd >= 3; odd -= 2)
            series = (series + 1.0 / odd) * square;
        return exponent * OctaveHigh + (2 * s + (2 * s * series + exponent * OctaveLow));
    }
}
