namespace MatchedSuite.Study.Endpoints;

/// <summary>A name, or a pattern in which * stands for any letters, also none.</summary>
internal sealed class NamePattern
{
    private readonly string[] _pieces;

    /// <summary>The pattern as it is written; capital letters count.</summary>
    public NamePattern(string text)
    {
        Text = text;
        _pieces = text.Split('*');
    }

    /// <summary>As written.</summary>
    public string Text { get; }

    /// <summary>True where the whole name fits.</summary>
    public bool Matches(string name)
    {
        if (_pieces.Length == 1)
            return name == Text;
        ReadOnlySpan<char> rest = name;
        if (!rest.StartsWith(_pieces[0], StringComparison.Ordinal))
            return false;
        rest = rest[_pieces[0].Length..];
        // Between two stars the first occurrence leaves most room for what follows.
        for (int piece = 1; piece < _pieces.Length - 1; piece++)
        {
            int at = rest.IndexOf(_pieces[piece], StringComparison.Ordinal);
            if (at < 0)
                return false;
            rest = rest[(at + _pieces[piece].Length)..];
        }

        return rest.EndsWith(_pieces[^1], StringComparison.Ordinal);
    }
}
