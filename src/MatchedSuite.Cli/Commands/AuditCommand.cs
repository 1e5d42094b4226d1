using System.CommandLine;
using MatchedSuite.Cli.Terminal;
using MatchedSuite.Engine.Running;
using MatchedSuite.Reporting;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Cli.Commands;

/// <summary><c>matched audit STUDY</c>: the matching audit alone.</summary>
internal static class AuditCommand
{
    public static Command Create(CommonOptions common)
    {
        var arguments = new RunArguments();
        var command = new Command("audit", "audit the matching alone; exit code 3 where a gate of the study file is broken");
        arguments.AddTo(command);
        command.SetAction((parsed, cancellation) => Task.FromResult(
            common.Run(parsed, voice => Run(arguments.StudyPath(parsed), arguments.Options(parsed), voice, cancellation))));
        return command;
    }

    private static int Run(string study, RunOptions options, Voice voice, CancellationToken cancellation)
    {
        FinishedAudit audit = AuditRun.Execute(study, options, RunPages.WriteMatching, voice, cancellation);
        if (!voice.IsQuiet)
        {
            voice.Result(MatchingPage.Text(audit.Study, audit.Audit));
            if (audit.Folder is { } folder)
                voice.Note($"audit in {folder}");
        }

        foreach (BrokenGate gate in audit.Audit.BrokenGates)
            voice.Error($"gate broken: {GateBrokenException.Describe(gate)}");
        return audit.Audit.BrokenGates.Length > 0 ? ExitCode.GateBroken : ExitCode.Done;
    }
}
