using System.CommandLine;
using MatchedSuite.Engine.Running;
using MatchedSuite.Reporting;

namespace MatchedSuite.Cli.Commands;

/// <summary><c>matched check STUDY</c>: the study file and the headers of its data, without reading values.</summary>
internal static class CheckCommand
{
    public static Command Create(CommonOptions common)
    {
        var study = new Argument<string>("STUDY") { Description = "the study file (YAML)" };
        var command = new Command("check", "validate the study file and the headers of the data; prints what would be run") { study };
        command.SetAction(parsed => common.Run(parsed, voice =>
        {
            StudyCheck check = StudyCheck.Run(parsed.GetRequiredValue(study));
            foreach (string warning in check.Warnings)
                voice.Warning(warning);
            if (!voice.IsQuiet)
                voice.Result(CheckPage.Text(check));
            return ExitCode.Done;
        }));
        return command;
    }
}
