namespace MatchedSuite.Statistics.Sets;

/// <summary>Which covariates say nothing of their own within sets: they are constant in every set, or follow from others.</summary>
public static class CollinearCovariates
{
    /// <summary>Positions of the covariates that a fit leaves out because the sets, or the covariates in front of them, determine them.</summary>
    /// <param name="sets">Sets with covariates; the endpoint's values play no part.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    public static int[] Of(in SetSample sets, Scratch scratch)
    {
        using Scratch.Frame frame = scratch.Open();
        Span<double> kept = frame.Doubles(sets.Members * sets.CovariateCount);
        Span<int> independent = frame.Integers(sets.CovariateCount);
        int count = WithinSetRegression.TakeCovariates(sets, kept, independent);
        var collinear = new List<int>();
        for (int c = 0; c < sets.CovariateCount; c++)
        {
            if (!independent[..count].Contains(c))
                collinear.Add(c);
        }

        return [.. collinear];
    }
}
