using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Takes the numbers beside one row.</summary>
/// <param name="output">Where they go.</param>
/// <param name="contrast">The row's contrast.</param>
/// <param name="stratum">The row's stratum.</param>
/// <param name="method">The row's method, or <see cref="DetailRow.NoMethod"/>.</param>
public readonly struct DetailSink(BlockOutput output, short contrast, short stratum, short method)
{
    /// <summary>Takes a number.</summary>
    public void Add(Quantity quantity, double value)
    {
        ref DetailRow detail = ref output.Details.Add();
        detail.Contrast = contrast;
        detail.Stratum = stratum;
        detail.Method = method;
        detail.Quantity = quantity;
        detail.Value = value;
    }

    /// <summary>Takes a probability, itself and its decimal logarithm.</summary>
    public void Add(Quantity value, Quantity logarithm, Probability p)
    {
        Add(value, p.Value);
        Add(logarithm, p.Log10);
    }
}
