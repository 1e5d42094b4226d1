using System.Runtime.CompilerServices;

namespace MatchedSuite.Statistics;

/// <summary>Checks of what a caller hands over; the caller's mistake throws.</summary>
internal static class Require
{
    public static void SameLength(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        if (left.Length != right.Length)
            throw new ArgumentException($"The two columns have {left.Length} and {right.Length} values; they must have one value per set each.");
    }

    public static void OpenUnitInterval(double value, [CallerArgumentExpression(nameof(value))] string name = "")
    {
        if (!(value > 0 && value < 1))
            throw new ArgumentOutOfRangeException(name, value, "The value must lie strictly between 0 and 1.");
    }

    public static void Positive(double value, [CallerArgumentExpression(nameof(value))] string name = "")
    {
        if (!(value > 0))
            throw new ArgumentOutOfRangeException(name, value, "The value must be greater than 0.");
    }

    public static void PositiveFinite(double value, [CallerArgumentExpression(nameof(value))] string name = "")
    {
        if (!(value > 0 && value < double.PositiveInfinity))
            throw new ArgumentOutOfRangeException(name, value, "The value must be greater than 0 and finite.");
    }

    public static void OnePerHypothesis(int hypotheses, int entries)
    {
        if (hypotheses != entries)
            throw new ArgumentException($"There are {hypotheses} p-values but {entries} entries beside them; each hypothesis needs exactly one.");
    }

    public static void Weights(ReadOnlySpan<double> weights)
    {
        for (int i = 0; i < weights.Length; i++)
        {
            if (!(weights[i] >= 0 && double.IsFinite(weights[i])))
                throw new ArgumentException($"Weight {i + 1} is {weights[i]}; a weight must be a finite number, 0 or more.");
        }
    }

    public static void OneStartASet(ReadOnlySpan<int> starts, int members)
    {
        if (starts.IsEmpty || starts[0] != 0 || starts[^1] != members)
            throw new ArgumentException($"The starts of the sets must begin with 0 and end with the number of members, {members}.");
        for (int s = 1; s < starts.Length; s++)
        {
            if (starts[s] < starts[s - 1])
                throw new ArgumentException($"Set {s} starts at {starts[s]}, before the set in front of it at {starts[s - 1]}.");
        }
    }

    public static void OneEntryAMember(int entries, int members)
    {
        if (entries != members)
            throw new ArgumentException($"There are {entries} entries for {members} members; there must be one a member.");
    }

    public static int WholeColumns(ReadOnlySpan<double> columns, int rows)
    {
        if (columns.IsEmpty)
            return 0;
        if (rows == 0 || columns.Length % rows != 0)
            throw new ArgumentException($"The covariates have {columns.Length} values, which is not a whole number of columns of {rows} rows.");
        return columns.Length / rows;
    }

    public static void OneEntryAColumn(int entries, int columns)
    {
        if (entries != columns)
            throw new ArgumentException($"There are {entries} entries for {columns} columns; there must be one a column.");
    }
}
