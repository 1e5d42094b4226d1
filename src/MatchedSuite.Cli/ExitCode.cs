namespace MatchedSuite.Cli;

/// <summary>What the program's exit codes mean; scripts rely on them.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>Unexpected failure.</summary>
    public const int Failed = 1;

    /// <summary>Usage, study-file or data error.</summary>
    public const int Refused = 2;

    /// <summary>A gate of the study file refused the data.</summary>
    public const int GateBroken = 3;

    /// <summary>Another run holds the output folder.</summary>
    public const int Busy = 4;

    /// <summary>Interrupted.</summary>
    public const int Interrupted = 130;
}
