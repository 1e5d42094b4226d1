using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>What adjustment adds to every row: one adjusted p-value an adjustment, missing where there is none, and remarks.</summary>
public sealed class AdjustedColumns
{
    private readonly Probability[][] _byAdjustment;
    private readonly bool[] _outOfReach;
    private readonly Dictionary<IntervalKind, Interval[]> _intervals = [];

    internal AdjustedColumns(int adjustments, int rows, IReadOnlyList<IntervalKind> intervals, IReadOnlyList<HypothesisGroup> groups)
    {
        foreach (IntervalKind kind in intervals)
        {
            _intervals[kind] = new Interval[rows];
            Array.Fill(_intervals[kind], Interval.None);
        }

        _byAdjustment = new Probability[adjustments][];
        for (int adjustment = 0; adjustment < adjustments; adjustment++)
        {
            _byAdjustment[adjustment] = new Probability[rows];
            Array.Fill(_byAdjustment[adjustment], Probability.Missing);
        }

        _outOfReach = new bool[rows];
        Groups = groups;
    }

    /// <summary>Which hypotheses were adjusted together.</summary>
    public IReadOnlyList<HypothesisGroup> Groups { get; }

    /// <summary>The adjusted p-value of one row.</summary>
    public Probability Of(int adjustment, int row) => _byAdjustment[adjustment][row];

    /// <summary>What is remarked of a row once the number of hypotheses is known.</summary>
    public Remarks RemarksOf(int row) => _outOfReach[row] ? Remarks.OutOfReach : Remarks.None;

    /// <summary>An interval of a row beside the marginal one; none where the row has none.</summary>
    public Interval IntervalOf(IntervalKind kind, int row) => _intervals[kind][row];

    internal void SetInterval(IntervalKind kind, int row, Interval interval) => _intervals[kind][row] = interval;

    internal void Set(int adjustment, int row, Probability p) => _byAdjustment[adjustment][row] = p;

    internal void MarkOutOfReach(int row) => _outOfReach[row] = true;
}
