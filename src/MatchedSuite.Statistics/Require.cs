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
}
