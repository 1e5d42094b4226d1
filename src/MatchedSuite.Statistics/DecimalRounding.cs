namespace MatchedSuite.Statistics;

/// <summary>How much binary subtraction of decimals may leave where the decimals leave nothing.</summary>
internal static class DecimalRounding
{
    // Subtraction of two decimals rounded to binary is off by at most a few units in the last place of the larger.
    private const double UnitsInLastPlace = 4;

    /// <summary>Rounding of a difference computed from values of at most this size.</summary>
    public static double Of(double magnitude) => UnitsInLastPlace * (Math.BitIncrement(magnitude) - magnitude);
}
