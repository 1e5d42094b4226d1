namespace MatchedSuite.Study.Matching;

/// <summary>Balance of a numeric variable over sets in which both sides are known; a spread of a single set is NaN.</summary>
/// <param name="IndexMean">Mean of the index side.</param>
/// <param name="IndexSd">Standard deviation of the index side, with n − 1.</param>
/// <param name="ReferenceMean">Mean of the reference side.</param>
/// <param name="ReferenceSd">Standard deviation of the reference side, with n − 1.</param>
/// <param name="MeanDifference">Mean of index minus reference within sets.</param>
/// <param name="LargestDifference">Largest absolute difference of an index and a reference person of a set.</param>
/// <param name="StandardisedDifference">Mean difference over the root mean square of the two standard deviations; 0 where both the difference and the spread are 0, NaN where only the spread is.</param>
public sealed record NumberBalance(
    double IndexMean,
    double IndexSd,
    double ReferenceMean,
    double ReferenceSd,
    double MeanDifference,
    double LargestDifference,
    double StandardisedDifference)
{
    /// <summary>The balance of n sets, n at least 1; means and standard deviations are over people, differences of means within sets.</summary>
    /// <param name="index">For each set the numbers of its index people, at least one.</param>
    /// <param name="reference">For each set the numbers of its reference people, at least one.</param>
    public static NumberBalance Of(IReadOnlyList<double[]> index, IReadOnlyList<double[]> reference)
    {
        double difference = 0;
        double largest = 0;
        for (int set = 0; set < index.Count; set++)
        {
            difference += index[set].Average() - reference[set].Average();
            largest = Math.Max(largest, Math.Max(index[set].Max() - reference[set].Min(), reference[set].Max() - index[set].Min()));
        }

        difference /= index.Count;
        var (indexMean, indexSd) = MeanAndSd([.. index.SelectMany(set => set)]);
        var (referenceMean, referenceSd) = MeanAndSd([.. reference.SelectMany(set => set)]);
        double spread = Math.Sqrt(((indexSd * indexSd) + (referenceSd * referenceSd)) / 2);
        double standardised = spread > 0 ? difference / spread : difference == 0 && spread == 0 ? 0 : double.NaN;
        return new NumberBalance(indexMean, indexSd, referenceMean, referenceSd, difference, largest, standardised);
    }

    private static (double Mean, double Sd) MeanAndSd(IReadOnlyList<double> values)
    {
        double mean = values.Sum() / values.Count;
        double squares = values.Sum(value => (value - mean) * (value - mean));
        return (mean, values.Count > 1 ? Math.Sqrt(squares / (values.Count - 1)) : double.NaN);
    }
}
