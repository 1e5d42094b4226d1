using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The days of the visits held against their windows and their order.</summary>
internal sealed class VisitDays
{
    private readonly double[] _days;
    private readonly IReadOnlyList<string> _visits;
    private readonly DayLimits?[] _limits;

    /// <summary>Takes the column; every cell of a row of interest must be a number or missing.</summary>
    /// <param name="window">The study's key <c>visit.window</c>.</param>
    /// <param name="visits">Names of the visits.</param>
    /// <param name="cells">The sheet.</param>
    /// <param name="ofInterest">True for the rows whose day is looked at.</param>
    public VisitDays(VisitWindow window, IReadOnlyList<string> visits, SheetCells cells, Func<int, bool> ofInterest)
    {
        string?[] texts = cells.Column(window.Column, "design.visit.window.column");
        _days = new double[texts.Length];
        for (int row = 0; row < texts.Length; row++)
            _days[row] = texts[row] is { } text && ofInterest(row) ? cells.Number(window.Column, row, text, "reads days from this column", "Correct the cell.") : double.NaN;
        _visits = visits;
        _limits = [.. visits.Select(visit => window.Limits.FirstOrDefault(limits => limits.Visit == visit))];
    }

    /// <summary>True where the day of a row is missing although its visit has limits.</summary>
    public bool IsUnknown(int row, int visit) => _limits[visit] is not null && double.IsNaN(_days[row]);

    /// <summary>True where a row was taken outside the window of its visit.</summary>
    public bool IsOutside(int row, int visit) => _limits[visit] is { } limits && (_days[row] < limits.From || _days[row] > limits.To);

    /// <summary>The visits of subjects that were not after the one before, among those whose days are known.</summary>
    public IEnumerable<OrderBreach> Breaches(IEnumerable<SubjectPlaces> subjects)
    {
        foreach (SubjectPlaces subject in subjects)
        {
            int earlier = -1;
            for (int visit = 0; visit < _visits.Count; visit++)
            {
                double[] days = DaysOf(subject, visit);
                if (days.Length == 0)
                    continue;
                if (earlier >= 0 && days.Min() <= DaysOf(subject, earlier).Max())
                    yield return new OrderBreach(subject.Subject, _visits[earlier], DaysOf(subject, earlier).Max(), _visits[visit], days.Min());
                earlier = visit;
            }
        }
    }

    private double[] DaysOf(SubjectPlaces subject, int visit) =>
        [.. subject.Places[visit].Select(row => _days[row]).Where(day => !double.IsNaN(day))];
}
