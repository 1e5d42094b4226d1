using System.CommandLine;
using MatchedSuite.Cli.Terminal;
using MatchedSuite.Engine.Demonstration;
using MatchedSuite.Engine.Running;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Cli.Commands;

/// <summary><c>matched demo</c>: writes the invented study into a folder and analyses it.</summary>
internal static class DemoCommand
{
    private const string UsualFolder = "matched-demo";

    public static Command Create(CommonOptions common)
    {
        var folder = new Option<string>("--out")
        {
            Description = "folder for the study and its results", HelpName = "DIR", DefaultValueFactory = _ => UsualFolder,
        };
        string[] designs = [.. DemoTable.All.Select(demo => WrittenName.Of(demo.Kind))];
        var design = new Option<string>("--design")
        {
            Description = $"kind of the invented study: {string.Join(", ", designs)}", HelpName = "KIND", DefaultValueFactory = _ => designs[0],
        };
        design.AcceptOnlyFromAmong(designs);
        var command = new Command("demo", "write an invented demo study into a folder and analyse it") { folder, design };
        command.SetAction((parsed, cancellation) => Task.FromResult(
            common.Run(parsed, voice => Run(
                Path.GetFullPath(parsed.GetRequiredValue(folder)), DemoTable.All[Array.IndexOf(designs, parsed.GetRequiredValue(design))].Write, voice, cancellation))));
        return command;
    }

    private static int Run(string folder, Func<string, string> write, Voice voice, CancellationToken cancellation)
    {
        string study = WriteStudy(folder, write);
        voice.Note($"wrote the invented study {study}; truth.csv beside it says which effects were planted");
        return AnalyzeCommand.Run(study, new RunOptions(), voice, cancellation);
    }

    // An earlier demo is written again; anybody else's files are left alone.
    private static void RefuseStrangers(string folder)
    {
        if (!Directory.Exists(folder) || !Directory.EnumerateFileSystemEntries(folder).Any() || File.Exists(Path.Combine(folder, "truth.csv")))
            return;
        throw new RefusalException(
            folder, "the folder holds files that are no demo study", "an empty folder, an earlier demo, or nothing", "Choose another folder with --out.");
    }

    private static string WriteStudy(string folder, Func<string, string> write)
    {
        try
        {
            RefuseStrangers(folder);
            Directory.CreateDirectory(folder);
            return write(folder);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            throw new RefusalException(
                folder, "the demo study cannot be written there", "a folder that this user may create and fill", "Choose another folder with --out.", error);
        }
    }
}
