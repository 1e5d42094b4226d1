namespace MatchedSuite.Engine.Evaluation;

/// <summary>Counts values below a detection limit.</summary>
internal static class BelowCount
{
    /// <summary>How many of the known values are below.</summary>
    /// <param name="above">1 for a value at or above the limit, 0 for one below, NaN for a missing one.</param>
    public static (int Below, int Known) Of(ReadOnlySpan<double> above)
    {
        int below = 0;
        int known = 0;
        foreach (double value in above)
        {
            known += double.IsNaN(value) ? 0 : 1;
            below += value == 0 ? 1 : 0;
        }

        return (below, known);
    }
}
