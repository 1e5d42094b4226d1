namespace MatchedSuite.Statistics.Visits;

/// <summary>All orders of a few items, one after another, each a swap of two from the one before.</summary>
/// <remarks>Source: Heap (1963), The Computer Journal 6, 293-298, in its loop form.</remarks>
internal ref struct Arrangements
{
    private readonly Span<int> _items;
    private readonly Span<int> _turns;
    private int _level;

    /// <summary>Starts at the order the items are in.</summary>
    /// <param name="items">Rearranged in place.</param>
    /// <param name="turns">Room for as many integers.</param>
    public Arrangements(Span<int> items, Span<int> turns)
    {
        _items = items;
        _turns = turns;
        _turns.Clear();
        _level = 1;
    }

    /// <summary>k!, the number of orders.</summary>
    public static long Count(int items)
    {
        long count = 1;
        for (int i = 2; i <= items; i++)
            count *= i;
        return count;
    }

    /// <summary>Goes to the next order.</summary>
    /// <returns>False after the last.</returns>
    public bool Next()
    {
        while (_level < _items.Length)
        {
            if (_turns[_level] < _level)
            {
                int other = _level % 2 == 0 ? 0 : _turns[_level];
                (_items[other], _items[_level]) = (_items[_level], _items[other]);
                _turns[_level]++;
                _level = 1;
                return true;
            }

            _turns[_level++] = 0;
        }

        return false;
    }
}
