using System.CommandLine;
using MatchedSuite.Cli.Terminal;

namespace MatchedSuite.Cli.Commands;

/// <summary>The options that every command takes.</summary>
internal sealed class CommonOptions
{
    private readonly Option<bool> _quiet = new("--quiet") { Description = "print errors only", Recursive = true };
    private readonly Option<bool> _verbose = new("--verbose") { Description = "print each step, and stack traces of errors", Recursive = true };
    private readonly Option<FileInfo?> _log = new("--log") { Description = "append what happens to FILE as JSON lines", HelpName = "FILE", Recursive = true };
    private readonly Option<bool> _noColor = new("--no-color") { Description = "no colours on a terminal", Recursive = true };

    /// <summary>Gives the options to the root command and so to all.</summary>
    public void AddTo(Command root)
    {
        root.Add(_quiet);
        root.Add(_verbose);
        root.Add(_log);
        root.Add(_noColor);
    }

    /// <summary>Runs a command's work with a voice set up as asked, and turns every failure into its message and exit code.</summary>
    public int Run(ParseResult parsed, Func<Voice, int> work)
    {
        Loudness loudness = parsed.GetValue(_quiet) ? Loudness.Quiet : parsed.GetValue(_verbose) ? Loudness.Verbose : Loudness.Usual;
        try
        {
            using Voice voice = Voice.Open(loudness, parsed.GetValue(_log)?.FullName, colours: !parsed.GetValue(_noColor));
            return FailureReport.Guard(voice, () => work(voice));
        }
        catch (IOException error)
        {
            Console.Error.WriteLine($"matched: the log file cannot be written: {error.Message}");
            return ExitCode.Refused;
        }
        catch (UnauthorizedAccessException error)
        {
            Console.Error.WriteLine($"matched: the log file cannot be written: {error.Message}");
            return ExitCode.Refused;
        }
    }
}
