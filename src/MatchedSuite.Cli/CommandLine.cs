namespace MatchedSuite.Cli;

/// <summary>The program's commands and options.</summary>
internal static class CommandLine
{
    public static int Run(string[] args) => args.Length;
}
