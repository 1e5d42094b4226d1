namespace MatchedSuite.Cli.Terminal;

/// <summary>How much the program says on standard error.</summary>
internal enum Loudness
{
    /// <summary>Errors only.</summary>
    Quiet,

    /// <summary>Warnings and what a person should know.</summary>
    Usual,

    /// <summary>Every step, and stack traces.</summary>
    Verbose,
}
