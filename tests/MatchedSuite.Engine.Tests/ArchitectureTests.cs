using System.Xml.Linq;

namespace MatchedSuite.Engine.Tests;

/// <summary>References run downward only: Cli → Reporting → Engine → Study → Storage, and Statistics below all.</summary>
public class ArchitectureTests
{
    private static readonly Dictionary<string, string[]> Allowed = new()
    {
        ["Statistics"] = [],
        ["Storage"] = [],
        ["Study"] = ["Statistics", "Storage"],
        ["Engine"] = ["Statistics", "Storage", "Study"],
        ["Reporting"] = ["Engine"],
        ["Cli"] = ["Reporting"],
    };

    [Fact]
    public void Projects_reference_only_what_stands_below_them()
    {
        string[] projects = [.. Directory.EnumerateFiles(Repository.Path("src"), "*.csproj", SearchOption.AllDirectories)];
        Assert.Equal(Allowed.Count, projects.Length);
        foreach (string project in projects)
        {
            string name = ShortName(project);
            string[] references = [.. XDocument.Load(project).Descendants("ProjectReference").Select(reference => ShortName(reference.Attribute("Include")!.Value))];
            Assert.Equal(Allowed[name].Order(), references.Order());
        }
    }

    [Fact]
    public void Only_the_command_line_talks_to_a_terminal()
    {
        string[] offenders = [.. Directory.EnumerateFiles(Repository.Path("src"), "*.cs", SearchOption.AllDirectories)
            .Where(file => !file.Contains("MatchedSuite.Cli", StringComparison.Ordinal))
            .Where(file => File.ReadAllText(file).Contains("Console.", StringComparison.Ordinal))];
        Assert.Empty(offenders);
    }

    [Fact]
    public void The_statistics_know_no_file()
    {
        string[] offenders = [.. Directory.EnumerateFiles(Repository.Path("src/MatchedSuite.Statistics"), "*.cs", SearchOption.AllDirectories)
            .Where(file => File.ReadAllText(file).Contains("System.IO", StringComparison.Ordinal) || File.ReadAllText(file).Contains("File.", StringComparison.Ordinal))];
        Assert.Empty(offenders);
    }

    private static string ShortName(string project) => Path.GetFileNameWithoutExtension(project.Replace('\\', '/'))["MatchedSuite.".Length..];
}
