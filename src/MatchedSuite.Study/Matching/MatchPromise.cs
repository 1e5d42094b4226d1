using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>One promise of the matching held against the complete sets.</summary>
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

    /// <summary>The breaches of a complete set, one for each index person with each reference person who do not match.</summary>
    public IEnumerable<ToleranceBreach> BreachesOf(SetPeople set) =>
        set.Index.SelectMany(index => set.Reference.Select(reference => BreachOf(set.Set, index, reference)).OfType<ToleranceBreach>());

    /// <summary>The breach of two people of a set, each given by the rows of their samples; null where they match or one has no value.</summary>
    public ToleranceBreach? BreachOf(string set, IReadOnlyList<int> indexPerson, IReadOnlyList<int> referencePerson)
    {
        if (_rule.Within is not { } within)
        {
            return HasValue(indexPerson) && HasValue(referencePerson) && !OneCategory(indexPerson.Concat(referencePerson))
                ? new ToleranceBreach(set, _rule.Column, Categories(indexPerson), Categories(referencePerson), Promise)
                : null;
        }

        double index = MeanOf(indexPerson);
        double reference = MeanOf(referencePerson);
        double larger = Math.Max(Math.Abs(index), Math.Abs(reference));
        double rounding = UnitsInLastPlace * (Math.BitIncrement(larger) - larger);
        return Math.Abs(index - reference) > within + rounding
            ? new ToleranceBreach(set, _rule.Column, Written(index), Written(reference), Promise)
            : null;
    }

    /// <summary>True where every person of a set has a value.</summary>
    public bool IsKnown(SetPeople set) => set.Everyone.All(HasValue);

    /// <summary>The balance over sets; a set is compared where some person of each role has a value.</summary>
    public MatchBalance BalanceOf(IReadOnlyCollection<SetPeople> sets)
    {
        SetPeople[] known = [.. sets.Where(set => set.Index.Any(HasValue) && set.Reference.Any(HasValue))];
        NumberBalance? numbers = _rule.Within is null || known.Length == 0
            ? null
            : NumberBalance.Of([.. known.Select(set => Numbers(set.Index))], [.. known.Select(set => Numbers(set.Reference))]);
        return new MatchBalance(_rule.Column, Promise, known.Length, sets.Count - known.Length, known.Count(Agrees), numbers);
    }

    private bool HasValue(IReadOnlyList<int> person) => person.Any(row => _texts[row] is not null);

    private bool Agrees(SetPeople set) =>
        _rule.Within is null ? OneCategory(set.Everyone.SelectMany(rows => rows)) : Numbers(set.Everyone).Distinct().Count() == 1;

    private bool OneCategory(IEnumerable<int> rows) => rows.Select(row => _texts[row]).OfType<string>().Distinct().Count() == 1;

    private double[] Numbers(IEnumerable<IReadOnlyList<int>> people) => [.. people.Select(MeanOf).Where(value => !double.IsNaN(value))];

    private double MeanOf(IReadOnlyList<int> person)
    {
        double[] known = [.. person.Select(row => _numbers[row]).Where(value => !double.IsNaN(value))];
        return known.Length == 0 ? double.NaN : known.Sum() / known.Length;
    }

    private string Categories(IReadOnlyList<int> rows) => string.Join(", ", rows.Select(row => _texts[row]).OfType<string>().Distinct());

    private static string Written(double value) => value.ToString(CultureInfo.InvariantCulture);
}
