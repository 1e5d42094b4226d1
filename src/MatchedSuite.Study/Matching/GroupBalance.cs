namespace MatchedSuite.Study.Matching;

/// <summary>How two groups of different subjects compare on one variable before treatment.</summary>
/// <param name="Variable">Name of the column, with the category where it stands for one: <c>sex=f</c>.</param>
/// <param name="Index">The index arm, or the sequence with the index treatment first.</param>
/// <param name="Reference">The other group.</param>
/// <param name="StandardisedDifference">Difference of the means over the root mean square of the two standard deviations; 0 where difference and spread are 0, NaN where only the spread is, or a group is empty.</param>
public sealed record GroupBalance(string Variable, GroupMoments Index, GroupMoments Reference, double StandardisedDifference)
{
    /// <summary>Compares two groups of numbers; NaN is missing.</summary>
    internal static GroupBalance Of(string variable, IEnumerable<double> index, IEnumerable<double> reference)
    {
        GroupMoments first = GroupMoments.Of([.. index.Where(value => !double.IsNaN(value))]);
        GroupMoments second = GroupMoments.Of([.. reference.Where(value => !double.IsNaN(value))]);
        double difference = first.Mean - second.Mean;
        double spread = Math.Sqrt(((first.Sd * first.Sd) + (second.Sd * second.Sd)) / 2);
        double standardised = spread > 0 ? difference / spread : difference == 0 && spread == 0 ? 0 : double.NaN;
        return new GroupBalance(variable, first, second, standardised);
    }
}

/// <summary>Mean and standard deviation of one group; of a category, its share is the mean.</summary>
/// <param name="Known">Subjects with a value.</param>
/// <param name="Mean">Mean; NaN for none.</param>
/// <param name="Sd">Standard deviation with n − 1; NaN for fewer than two.</param>
public sealed record GroupMoments(int Known, double Mean, double Sd)
{
    /// <summary>The moments of known values.</summary>
    internal static GroupMoments Of(double[] values)
    {
        double mean = values.Length == 0 ? double.NaN : values.Sum() / values.Length;
        double squares = values.Sum(value => (value - mean) * (value - mean));
        return new GroupMoments(values.Length, mean, values.Length > 1 ? Math.Sqrt(squares / (values.Length - 1)) : double.NaN);
    }
}
