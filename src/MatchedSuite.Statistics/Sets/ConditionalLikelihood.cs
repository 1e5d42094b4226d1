namespace MatchedSuite.Statistics.Sets;

/// <summary>
/// The exact conditional log-likelihood of roles within sets given columns of member values, with its derivatives.
/// </summary>
/// <remarks>
/// In a set with n members of which k have the index role, the probability that just those k have it is
/// exp(β·Σ x over them) / Σ over all subsets of size k of exp(β·Σ x over the subset).
/// Sources: Breslow and Day (1980), Statistical Methods in Cancer Research I, ch. VII; Gail, Lubin and Rubinstein (1981),
/// Biometrika 68(3), 703-707.
/// </remarks>
internal readonly ref struct ConditionalLikelihood
{
    private readonly SingleChoiceTiles _tiles;
    private readonly SingleChoices _singles;
    private readonly SubsetChoices _subsets;

    private ConditionalLikelihood(SingleChoiceTiles tiles, SubsetChoices subsets, int columns, in Scratch.Frame frame)
    {
        _tiles = tiles;
        _singles = new SingleChoices(tiles, frame);
        _subsets = subsets;
        Columns = columns;
    }

    /// <summary>Number of columns, hence of coefficients.</summary>
    public int Columns { get; }

    /// <summary>Lays the members out for repeated evaluation.</summary>
    /// <param name="sets">Which members form which set, and their roles.</param>
    /// <param name="design">Columns one after another, one value a member of <paramref name="sets"/>.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public static ConditionalLikelihood Of(in SetSample sets, ReadOnlySpan<double> design, int columns, in Scratch.Frame frame) =>
        new(SingleChoiceTiles.Of(sets, design, columns, frame), SubsetChoices.Of(sets, design, columns, frame), columns, frame);

    /// <summary>The log-likelihood at <paramref name="beta"/>, with gradient and information (minus the second derivatives).</summary>
    /// <param name="beta">One coefficient a column.</param>
    /// <param name="gradient">Receives the first derivatives.</param>
    /// <param name="information">Receives the lower triangle of a columns × columns matrix, row after row.</param>
    public double Evaluate(ReadOnlySpan<double> beta, Span<double> gradient, Span<double> information)
    {
        gradient.Clear();
        information.Clear();
        return _singles.AddTo(beta, gradient, information) + _subsets.AddTo(beta, gradient, information);
    }

    /// <summary>
    /// True where the likelihood never falls along a direction and rises somewhere: in every set no member outside the index
    /// role stands above one inside it, so that no finite maximum exists.
    /// </summary>
    /// <param name="direction">One entry a column.</param>
    /// <param name="tolerances">
    /// One a column: two members count as level up to the sum of these times the sizes of their differences.
    /// </param>
    public bool NeverFallsAlong(ReadOnlySpan<double> direction, ReadOnlySpan<double> tolerances)
    {
        var singles = _tiles.LeadAlong(direction, tolerances);
        if (!singles.NeverBehind)
            return false;
        var subsets = _subsets.LeadAlong(direction, tolerances);
        return subsets.NeverBehind && (singles.SomewhereAhead || subsets.SomewhereAhead);
    }

    /// <summary>
    /// The log-likelihood of a single column where its coefficient goes to infinity and it never falls on the way: minus the
    /// sum of the logarithms of how many subsets stand as high as the chosen one.
    /// </summary>
    public double LimitAlong(double direction) => _tiles.LimitAlong(direction) + _subsets.LimitAlong(direction);
}
