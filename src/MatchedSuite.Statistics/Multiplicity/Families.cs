namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Hypotheses sorted into families that are numbered 0, 1, 2, ….</summary>
public sealed class Families
{
    private readonly int[] _positions;
    private readonly int[] _starts;

    /// <summary>Sorts hypotheses into families.</summary>
    /// <param name="familyOf">The family of each hypothesis, from 0; a number that does not occur is an empty family.</param>
    /// <exception cref="ArgumentException">A number is negative.</exception>
    public Families(ReadOnlySpan<int> familyOf)
    {
        int count = 0;
        for (int i = 0; i < familyOf.Length; i++)
        {
            if (familyOf[i] < 0)
                throw new ArgumentException($"Hypothesis {i + 1} is in family {familyOf[i]}; families are numbered from 0.", nameof(familyOf));
            count = Math.Max(count, familyOf[i] + 1);
        }

        _starts = new int[count + 1];
        foreach (int family in familyOf)
            _starts[family + 1]++;
        for (int family = 0; family < count; family++)
            _starts[family + 1] += _starts[family];

        _positions = new int[familyOf.Length];
        var next = _starts.AsSpan(0, count).ToArray();
        for (int i = 0; i < familyOf.Length; i++)
            _positions[next[familyOf[i]]++] = i;
    }

    /// <summary>Number of families, empty ones included.</summary>
    public int Count => _starts.Length - 1;

    /// <summary>Number of hypotheses in all families.</summary>
    public int Hypotheses => _positions.Length;

    /// <summary>Input positions of the members of one family, ascending.</summary>
    public ReadOnlySpan<int> Members(int family) => _positions.AsSpan(_starts[family].._starts[family + 1]);

    /// <summary>Adjusts each family by itself, as if there were no other.</summary>
    /// <param name="procedure">The adjustment.</param>
    /// <param name="p">p-values in any order.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public void AdjustEach(Adjustment procedure, ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        ArgumentNullException.ThrowIfNull(procedure);
        Require.OnePerHypothesis(p.Length, _positions.Length);
        Require.OnePerHypothesis(p.Length, adjusted.Length);
        for (int family = 0; family < Count; family++)
        {
            var members = Members(family);
            var own = PValuesOf(family, p);
            var result = new Probability[members.Length];
            procedure(own, result);
            for (int member = 0; member < members.Length; member++)
                adjusted[members[member]] = result[member];
        }
    }

    /// <summary>The p-values of one family, in input order.</summary>
    internal Probability[] PValuesOf(int family, ReadOnlySpan<Probability> p)
    {
        var members = Members(family);
        var own = new Probability[members.Length];
        for (int member = 0; member < members.Length; member++)
            own[member] = p[members[member]];
        return own;
    }
}
