namespace MatchedSuite.Engine.Rows;

/// <summary>From the scale of a logarithm back to a ratio.</summary>
public static class Ratio
{
    /// <summary>The ratio whose logarithm is <paramref name="logarithm"/>; NaN where the scale is no logarithm.</summary>
    public static double Of(double logarithm, LogBase scale) => scale switch
    {
        LogBase.Natural => Math.Exp(logarithm),
        LogBase.Two => Math.Pow(2, logarithm),
        LogBase.Ten => Math.Pow(10, logarithm),
        _ => double.NaN,
    };
}
