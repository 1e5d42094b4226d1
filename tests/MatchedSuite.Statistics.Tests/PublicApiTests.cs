namespace MatchedSuite.Statistics.Tests;

public class PublicApiTests
{
    // Set to 1, it makes the test write the file instead of comparing with it.
    private const string UpdateVariable = "UPDATE_PUBLIC_API";

    [Fact]
    public void The_public_surface_is_the_one_written_down()
    {
        string path = Path.Combine(Root(), "src", "MatchedSuite.Statistics", "PublicApi.txt");
        string[] actual = [.. PublicSurface.Of(typeof(Probability).Assembly)];
        if (Environment.GetEnvironmentVariable(UpdateVariable) == "1")
            File.WriteAllText(path, string.Join('\n', actual) + '\n');

        Assert.True(File.Exists(path), $"{path} is missing. {Remedy}");
        string[] written = File.ReadAllLines(path);
        if (actual.SequenceEqual(written))
            return;
        // A member line means something under its type only, so each is compared together with it.
        var now = WithTypes(actual).ToHashSet();
        var before = WithTypes(written).ToHashSet();
        Assert.Fail($"The public surface of MatchedSuite.Statistics differs from {path}.\n"
            + string.Concat(before.Except(now).Select(line => $"  gone: {line}\n"))
            + string.Concat(now.Except(before).Select(line => $"  new:  {line}\n")) + Remedy);
    }

    [Fact]
    public void The_surface_names_types_members_directions_and_enum_values()
    {
        string[] lines = [.. PublicSurface.Of(typeof(Probability).Assembly)];
        Assert.Contains("static class MatchedSuite.Statistics.Distributions.StudentT", lines);
        Assert.Contains("    static Probability UpperTail(double t, double df)", lines);
        Assert.Contains("    Greater = 1", lines);
        Assert.Contains("    double Confidence { get; init; }", lines);
        Assert.DoesNotContain(lines, line => line.Contains("RegularizedBeta", StringComparison.Ordinal));
    }

    private static string Remedy =>
        $"If the change is meant, write the file anew and commit it: {UpdateVariable}=1 dotnet test tests/MatchedSuite.Statistics.Tests";

    private static IEnumerable<string> WithTypes(IEnumerable<string> lines)
    {
        string type = "";
        foreach (string line in lines)
        {
            bool member = line.StartsWith(' ');
            if (!member)
                type = line;
            yield return member ? $"{type} > {line.Trim()}" : line;
        }
    }

    private static string Root()
    {
        DirectoryInfo? directory = new(AppContext.BaseDirectory);
        while (directory is not null && !File.Exists(Path.Combine(directory.FullName, "MatchedSuite.sln")))
            directory = directory.Parent;
        return directory?.FullName
            ?? throw new DirectoryNotFoundException($"No folder above {AppContext.BaseDirectory} holds MatchedSuite.sln.");
    }
}
