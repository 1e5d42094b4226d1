using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The adjusted p-values of every row, one column an adjustment; missing where a row was not tested.</summary>
public sealed class AdjustedColumns
{
    private readonly Probability[][] _byAdjustment;

    internal AdjustedColumns(Probability[][] byAdjustment, IReadOnlyList<HypothesisGroup> groups)
    {
        _byAdjustment = byAdjustment;
        Groups = groups;
    }

    /// <summary>Which hypotheses were adjusted together.</summary>
    public IReadOnlyList<HypothesisGroup> Groups { get; }

    /// <summary>The adjusted p-value of one row.</summary>
    public Probability Of(int adjustment, int row) => _byAdjustment[adjustment][row];
}
