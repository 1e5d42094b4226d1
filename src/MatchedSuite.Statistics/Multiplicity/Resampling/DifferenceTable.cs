namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Differences of all endpoints held in memory.</summary>
public sealed class DifferenceTable : IDifferenceStore
{
    private readonly ReadOnlyMemory<double> _differences;

    /// <summary>A table over memory that stays the caller's.</summary>
    /// <param name="differences">endpoints × sets differences, endpoint after endpoint; NaN where a set lacks the endpoint.</param>
    /// <param name="sets">Number of sets, at least 1.</param>
    /// <exception cref="ArgumentException">The length is no multiple of <paramref name="sets"/>, or that is not positive.</exception>
    public DifferenceTable(ReadOnlyMemory<double> differences, int sets)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(sets);
        if (differences.Length % sets != 0)
            throw new ArgumentException($"{differences.Length} differences are no whole number of endpoints of {sets} sets.", nameof(differences));
        _differences = differences;
        Sets = sets;
    }

    /// <inheritdoc/>
    public int Endpoints => _differences.Length / Sets;

    /// <inheritdoc/>
    public int Sets { get; }

    /// <inheritdoc/>
    public void Read(int first, int count, Span<double> destination) =>
        _differences.Span.Slice(first * Sets, count * Sets).CopyTo(destination);
}
