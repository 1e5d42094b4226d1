using System.CommandLine;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Cli.Commands;

/// <summary>The study file and the options of commands that run one.</summary>
internal sealed class RunArguments
{
    private const long LeastMemory = 64L << 20;
    private readonly Argument<string> _study = new("STUDY") { Description = "the study file (YAML)" };
    private readonly Option<string?> _out = new("--out") { Description = "folder for the results, instead of the study file's output.folder", HelpName = "DIR" };
    private readonly Option<long?> _threads = NumberArguments.Whole("--threads", "threads to use; default: all cores", "N", least: 1);
    private readonly Option<long?> _seed = NumberArguments.Whole("--seed", "seed, instead of the study file's", "N", least: long.MinValue);
    private readonly Option<long?> _memory = NumberArguments.Size("--memory", "upper bound for the values held in memory; default: 1GiB", LeastMemory);
    private readonly Option<bool> _noReport = new("--no-report") { Description = "write no report, whatever the study file says" };
    private readonly Option<bool> _strict = new("--strict") { Description = "warnings become refusals" };

    /// <summary>Gives the study argument and all options to a command.</summary>
    public void AddTo(Command command)
    {
        command.Add(_study);
        command.Add(_out);
        command.Add(_threads);
        command.Add(_seed);
        command.Add(_memory);
        command.Add(_strict);
        command.Add(_noReport);
    }

    /// <summary>The study file's path as typed.</summary>
    public string StudyPath(ParseResult parsed) => parsed.GetRequiredValue(_study);

    /// <summary>The options as the engine takes them.</summary>
    public RunOptions Options(ParseResult parsed)
    {
        RunOptions usual = new();
        return usual with
        {
            Folder = parsed.GetValue(_out),
            Threads = (int)Math.Min(parsed.GetValue(_threads) ?? usual.Threads, 1024),
            Seed = parsed.GetValue(_seed),
            Memory = parsed.GetValue(_memory) ?? usual.Memory,
            Report = parsed.GetValue(_noReport) ? false : null,
            Warnings = parsed.GetValue(_strict) ? WarningRule.Refuse : WarningRule.Report,
        };
    }
}
