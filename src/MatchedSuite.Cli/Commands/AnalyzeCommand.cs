using System.CommandLine;
using MatchedSuite.Cli.Terminal;
using MatchedSuite.Engine.Running;
using MatchedSuite.Reporting;

namespace MatchedSuite.Cli.Commands;

/// <summary><c>matched analyze STUDY</c>: the main job.</summary>
internal static class AnalyzeCommand
{
    public static Command Create(CommonOptions common)
    {
        var arguments = new RunArguments();
        var command = new Command("analyze", "read, audit the matching, test every endpoint, adjust, write results and summary");
        arguments.AddTo(command);
        command.SetAction((parsed, cancellation) => Task.FromResult(
            common.Run(parsed, voice => Run(arguments.StudyPath(parsed), arguments.Options(parsed), voice, cancellation))));
        return command;
    }

    /// <summary>Analyses a study and prints its summary.</summary>
    public static int Run(string study, RunOptions options, Voice voice, CancellationToken cancellation)
    {
        FinishedRun run = AnalysisRun.Execute(study, options, RunPages.WriteMatching, RunPages.WriteSummary, voice, cancellation);
        if (voice.IsQuiet)
            return ExitCode.Done;
        voice.Result(SummaryTable.Text(run));
        foreach (string sentence in RunSentences.Of(run))
            voice.Note(sentence);
        foreach (string caution in run.Cautions)
            voice.Note($"caution: {caution}");
        voice.Note($"results in {run.Folder}");
        return ExitCode.Done;
    }
}
