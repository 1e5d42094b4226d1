using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>One promise of the matching held against the complete pairs.</summary>
internal sealed class MatchPromise
{
    // Decimals such as 31.3 − 29.3 leave a few units in the last place; a limit must not be broken by them.
    private const double UnitsInLastPlace = 4;

    private readonly MatchRule _rule;
    private readonly string?[] _texts;
    private readonly double[] _numbers;

    /// <summary>Takes the column; with <c>within</c> every cell of a row of interest must be a number.</summary>
    /// <param name="rule">The promise.</param>
    /// <param name="cells">The sheet.</param>
    /// <param name="ofInterest">True for the rows whose cells are looked at.</param>
    public MatchPromise(MatchRule rule, SheetCells cells, Func<int, bool> ofInterest)
    {
        _rule = rule;
        _texts = cells.Column(rule.Column, "design.match-on");
        _numbers = new double[rule.Within is null ? 0 : _texts.Length];
        for (int row = 0; row < _numbers.Length; row++)
            _numbers[row] = _texts[row] is { } text && ofInterest(row) ? cells.Number(rule.Column, row, text) : double.NaN;
    }

    /// <summary>What was promised, in words.</summary>
    public string Promise =>
        _rule.Within is { } within ? string.Create(CultureInfo.InvariantCulture, $"within {within}") : "equal";

    /// <summary>The breach of a complete set; null where it keeps the promise or a side is missing.</summary>
    public ToleranceBreach? BreachOf(PairMembers set)
    {
        if (_rule.Within is not { } within)
        {
            return IsKnown(set) && !Agrees(set)
                ? new ToleranceBreach(set.Set, _rule.Column, Categories(set.Index), Categories(set.Reference), Promise)
                : null;
        }

        double index = MeanOf(set.Index);
        double reference = MeanOf(set.Reference);
        double larger = Math.Max(Math.Abs(index), Math.Abs(reference));
        double rounding = UnitsInLastPlace * (Math.BitIncrement(larger) - larger);
        return Math.Abs(index - reference) > within + rounding
            ? new ToleranceBreach(set.Set, _rule.Column, Written(index), Written(reference), Promise)
            : null;
    }

    /// <summary>True where both sides of a set have a value.</summary>
    public bool IsKnown(PairMembers set) => HasValue(set.Index) && HasValue(set.Reference);

    /// <summary>The balance over sets.</summary>
    public MatchBalance BalanceOf(IReadOnlyCollection<PairMembers> sets)
    {
        PairMembers[] known = [.. sets.Where(IsKnown)];
        NumberBalance? numbers = _rule.Within is null || known.Length == 0
            ? null
            : NumberBalance.Of([.. known.Select(set => MeanOf(set.Index))], [.. known.Select(set => MeanOf(set.Reference))]);
        return new MatchBalance(_rule.Column, Promise, known.Length, sets.Count - known.Length, known.Count(Agrees), numbers);
    }

    private bool HasValue(List<int> rows) => rows.Exists(row => _texts[row] is not null);

    private bool Agrees(PairMembers set) =>
        _rule.Within is null
            ? set.Rows.Select(row => _texts[row]).OfType<string>().Distinct().Count() == 1
            : MeanOf(set.Index) == MeanOf(set.Reference);

    private double MeanOf(List<int> rows)
    {
        double[] known = [.. rows.Select(row => _numbers[row]).Where(value => !double.IsNaN(value))];
        return known.Length == 0 ? double.NaN : known.Sum() / known.Length;
    }

    private string Categories(List<int> rows) => string.Join(", ", rows.Select(row => _texts[row]).OfType<string>().Distinct());

    private static string Written(double value) => value.ToString(CultureInfo.InvariantCulture);
}
