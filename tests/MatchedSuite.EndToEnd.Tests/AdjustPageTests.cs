using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>docs/adjust.md shows what the program does: its files are written, its commands run, its outputs compared.</summary>
public class AdjustPageTests
{
    [Fact]
    public void Every_command_of_the_page_prints_what_the_page_shows()
    {
        using var folder = new StudyFolder();
        string output = "";
        int commands = 0;
        foreach (var (heading, text) in Blocks(File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "docs", "adjust.md"))))
        {
            if (heading == "sh")
            {
                Finished run = folder.Run(text.TrimEnd().Split(' ')[1..]);
                Assert.True(run.ExitCode == 0, run.Error);
                output = run.Output;
                commands++;
            }
            else if (heading == "text")
            {
                Assert.Equal(text, output);
            }
            else
            {
                folder.Write(heading.Split(' ')[1], text);
            }
        }

        Assert.Equal(3, commands);
    }

    private static IEnumerable<(string Heading, string Text)> Blocks(string[] lines)
    {
        string? heading = null;
        string text = "";
        foreach (string line in lines)
        {
            if (!line.StartsWith("```", StringComparison.Ordinal))
            {
                text += line + "\n";
                continue;
            }

            if (heading is not null)
                yield return (heading, text);
            heading = heading is null ? line[3..] : null;
            text = "";
        }
    }
}
