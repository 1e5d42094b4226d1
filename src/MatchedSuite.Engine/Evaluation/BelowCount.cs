namespace MatchedSuite.Engine.Evaluation;

/// <summary>Counts values below a detection limit.</summary>
internal static class BelowCount
{
    /// <summary>Counts, and rounds to 0 or 1: a mean of replicates on both sides of the limit counts as above from one half on.</summary>
    /// <param name="above">1 for a value at or above the limit, 0 for one below, NaN for a missing one.</param>
    public static (int Below, int Known) Of(Span<double> above)
    {
        int below = 0;
        int known = 0;
        foreach (ref double value in above)
        {
            if (double.IsNaN(value))
                continue;
            value = value < 0.5 ? 0 : 1;
            known++;
            below += value == 0 ? 1 : 0;
        }

        return (below, known);
    }
}
