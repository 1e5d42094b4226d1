namespace MatchedSuite.Engine.Evaluation;

/// <summary>Yes/no values that were averaged over replicates.</summary>
internal static class MeanSigns
{
    /// <summary>Brings every value to 0 or 1: a mean counts as yes from one half on; NaN stays.</summary>
    public static void Round(Span<double> values)
    {
        foreach (ref double value in values)
        {
            if (!double.IsNaN(value))
                value = value < 0.5 ? 0 : 1;
        }
    }
}
