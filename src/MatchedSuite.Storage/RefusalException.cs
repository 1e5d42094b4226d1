namespace MatchedSuite.Storage;

/// <summary>The user's input is refused: one message that says where, what was found, what was expected and what to do.</summary>
/// <remarks>The program ends with exit code 2 and writes nothing. The message is complete; no stack trace is needed to act on it.</remarks>
public sealed class RefusalException : Exception
{
    /// <summary>A refusal.</summary>
    /// <param name="where">File, with line, column, key path or endpoint where known: <c>panel.csv, line 118, endpoint 'crp'</c>.</param>
    /// <param name="found">What was found, as a clause: <c>'n.d.' is not a number</c>.</param>
    /// <param name="expected">What was expected, as a noun phrase: <c>a decimal number or a missing mark ('', 'NA')</c>.</param>
    /// <param name="remedy">What to do, as a sentence; may be empty where that is plain.</param>
    /// <param name="cause">The failure behind it, shown with <c>--verbose</c>.</param>
    public RefusalException(string where, string found, string expected, string remedy = "", Exception? cause = null)
        : base(Compose(where, found, expected, remedy), cause)
    {
        Where = where;
        Found = found;
        Expected = expected;
        Remedy = remedy;
    }

    /// <summary>File and place in it.</summary>
    public string Where { get; }

    /// <summary>What was found.</summary>
    public string Found { get; }

    /// <summary>What was expected.</summary>
    public string Expected { get; }

    /// <summary>What to do; may be empty.</summary>
    public string Remedy { get; }

    private static string Compose(string where, string found, string expected, string remedy)
    {
        string message = $"{where}: {found}. Expected {expected}.";
        return remedy.Length == 0 ? message : $"{message} {remedy}";
    }
}
