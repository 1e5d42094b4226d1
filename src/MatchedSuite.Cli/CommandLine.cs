using System.CommandLine;
using MatchedSuite.Cli.Commands;

namespace MatchedSuite.Cli;

/// <summary>The program's commands and what they have in common.</summary>
internal static class CommandLine
{
    private const string Job =
        "Finds out which of very many endpoints differ within linked people: proves the matching, tests every endpoint,\n" +
        "adjusts for their number, and leaves a record that anyone can rerun. A screen is not a diagnosis.";

    /// <summary>Parses and runs one command line.</summary>
    /// <returns>The exit code.</returns>
    public static int Run(string[] args)
    {
        ParseResult parsed = Root().Parse(args);
        if (parsed.Errors.Count > 0)
        {
            foreach (string complaint in UsageComplaint.Of(parsed))
                Console.Error.WriteLine($"matched: {complaint}");
            Console.Error.WriteLine("matched: see 'matched --help' for the commands and their options");
            return ExitCode.Refused;
        }

        return parsed.Invoke(new InvocationConfiguration
        {
            EnableDefaultExceptionHandler = false,
            ProcessTerminationTimeout = TimeSpan.FromSeconds(30),
        });
    }

    /// <summary>The root command with every command of this version.</summary>
    internal static RootCommand Root()
    {
        var common = new CommonOptions();
        var root = new RootCommand(Job)
        {
            AnalyzeCommand.Create(common),
            AuditCommand.Create(common),
            CheckCommand.Create(common),
            AdjustCommand.Create(common),
            DemoCommand.Create(common),
        };
        common.AddTo(root);
        return root;
    }
}
