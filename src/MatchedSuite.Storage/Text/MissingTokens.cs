namespace MatchedSuite.Storage.Text;

/// <summary>The cell texts that stand for a missing value.</summary>
internal sealed class MissingTokens
{
    private readonly string[] _tokens;
    private readonly bool[] _firstLetters = new bool[128];
    private readonly bool _anyBeyondAscii;

    public MissingTokens(IReadOnlyList<string> tokens)
    {
        _tokens = [.. tokens.Select(token => token.Trim()).Distinct(StringComparer.Ordinal)];
        EmptyIsMissing = _tokens.Contains("");
        foreach (string token in _tokens.Where(token => token.Length > 0))
        {
            if (token[0] < 128) _firstLetters[token[0]] = true;
            else _anyBeyondAscii = true;
        }
    }

    /// <summary>True when an empty cell is missing.</summary>
    public bool EmptyIsMissing { get; }

    /// <summary>The tokens as a message shows them: <c>'', 'NA'</c>.</summary>
    public string Listed => string.Join(", ", _tokens.Select(token => $"'{token}'"));

    /// <summary>True when a trimmed cell is one of the tokens, letter for letter.</summary>
    public bool Contains(ReadOnlySpan<char> cell)
    {
        if (cell.IsEmpty) return EmptyIsMissing;
        // Most cells are numbers and no token begins like them.
        bool candidate = cell[0] < 128 ? _firstLetters[cell[0]] : _anyBeyondAscii;
        if (!candidate) return false;
        foreach (string token in _tokens)
            if (cell.SequenceEqual(token)) return true;
        return false;
    }
}
