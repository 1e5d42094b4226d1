using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Endpoints;

/// <summary>From measured values to the analysis scale.</summary>
public static class ValueTransform
{
    /// <summary>Transforms values in place; those that have no transform (logarithm of zero or less) become NaN.</summary>
    /// <returns>How many values had no transform.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The transform needs all samples at once and is not made value by value.</exception>
    public static int Apply(Transform transform, Span<double> values) => transform switch
    {
        Transform.None => 0,
        Transform.Log => Logarithms(values, Math.Log),
        Transform.Log2 => Logarithms(values, Math.Log2),
        Transform.Log10 => Logarithms(values, Math.Log10),
        Transform.Sqrt => SquareRoots(values),
        _ => throw new ArgumentOutOfRangeException(nameof(transform), transform, "The transform is not made value by value."),
    };

    private static int Logarithms(Span<double> values, Func<double, double> logarithm)
    {
        int undefined = 0;
        foreach (ref double value in values)
        {
            if (value <= 0)
            {
                undefined++;
                value = double.NaN;
            }
            else
            {
                value = logarithm(value);
            }
        }

        return undefined;
    }

    private static int SquareRoots(Span<double> values)
    {
        int undefined = 0;
        foreach (ref double value in values)
        {
            if (value < 0)
                undefined++;
            value = Math.Sqrt(value);
        }

        return undefined;
    }
}
