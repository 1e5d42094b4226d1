using System.Text.RegularExpressions;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;
using MatchedSuite.Study.Tests.Matching;

namespace MatchedSuite.Study.Tests;

/// <summary>The published templates and pages say what the code does.</summary>
public partial class PublishedFilesTests
{
    private static readonly string StudyPage = Published("study-file.md");
    private static readonly string MatchingPage = Published("matching.md");

    [Fact]
    public void The_template_for_pairs_is_a_study_file()
    {
        StudyDefinition study = StudyFolder.Read(Published("pairs.yaml"));
        Assert.Equal(DesignKind.Pairs, study.Design.Kind);
        Assert.Equal(new TwoGroups("group", "case", "control"), study.Design.Role);
    }

    [Fact]
    public void The_template_for_pairs_is_one_too_with_its_comments_taken_at_their_word()
    {
        string text = CommentedKey().Replace(Published("pairs.yaml"), "$1$2");
        StudyDefinition study = StudyFolder.Read(text);
        Assert.Equal([new MatchRule("age", 2), new MatchRule("sex", null)], study.Design.MatchOn);
        Assert.Equal("participant", study.Design.Subject);
    }

    [Fact]
    public void The_template_for_sets_is_a_study_file_and_one_too_with_its_comments_taken_at_their_word()
    {
        StudyDefinition plain = StudyFolder.Read(Published("sets.yaml"));
        Assert.Equal(DesignKind.Sets, plain.Design.Kind);
        Assert.True(plain.Endpoints.PerStandardDeviation);
        StudyDefinition full = StudyFolder.Read(CommentedKey().Replace(Published("sets.yaml"), "$1$2"));
        Assert.True(full.Design.ReuseAllowed);
        Assert.Equal([new MatchRule("age", 2), new MatchRule("sex", null)], full.Design.MatchOn);
        Assert.Equal(["smoking", "bmi"], full.Design.Covariates);
        Assert.Equal([IntervalKind.Profile], full.Analysis.Intervals);
    }

    [Theory]
    [InlineData("visits.yaml", DesignKind.Visits)]
    [InlineData("change-by-arm.yaml", DesignKind.ChangeByArm)]
    [InlineData("crossover.yaml", DesignKind.Crossover)]
    public void The_templates_for_subjects_are_study_files_and_ones_too_with_their_comments_taken_at_their_word(string template, DesignKind kind)
    {
        StudyDefinition plain = StudyFolder.Read(Published(template));
        Assert.Equal((kind, "participant"), (plain.Design.Kind, plain.Design.Subject));
        StudyDefinition full = StudyFolder.Read(CommentedKey().Replace(Published(template), "$1$2"));
        Assert.NotNull(full.Design.Stratum);
        Assert.Equal(kind != DesignKind.Crossover, full.Design.Visit?.Window is not null);
        Assert.NotNull(full.Endpoints.Dictionary);
    }

    [Fact]
    public void Every_study_file_on_the_page_is_read_and_every_design_is_among_them()
    {
        string[] files = [.. YamlBlock().Matches(StudyPage).Select(match => match.Groups[1].Value).Where(text => text.StartsWith("schema:", StringComparison.Ordinal))];
        Assert.Equal(Enum.GetValues<DesignKind>(), files.Select(text => StudyFolder.Read(text).Design.Kind).Distinct().Order());
    }

    [Fact]
    public void Every_key_method_and_adjustment_stands_on_the_page()
    {
        IEnumerable<string> names = StudyKeys.All.Select(key => key.Split('.')[^1].TrimEnd('[', ']')).Concat(KnownNames.Methods).Concat(KnownNames.Adjustments);
        Assert.All(names, name => Assert.Matches($@"[`{{ ]{Regex.Escape(name)}[`:,}}]", StudyPage));
    }

    [Fact]
    public void Every_disposition_stands_on_the_page_in_the_order_of_the_checks()
    {
        string table = MatchingPage[..MatchingPage.IndexOf("## Several", StringComparison.Ordinal)];
        string[] codes = [.. DispositionRow().Matches(table).Select(match => match.Groups[1].Value)];
        Assert.Equal(WrittenName.All<Disposition>().Skip(1).Append("used"), codes);
    }

    [Fact]
    public void The_example_on_the_page_is_what_the_audit_says()
    {
        string[] lines = MatchingPage.Split('\n');
        string[] rows = [.. lines.SkipWhile(line => !line.StartsWith("| id | pair", StringComparison.Ordinal)).TakeWhile(line => line.StartsWith('|'))];
        string sheet = string.Concat(rows.Where(row => !row.Contains("---", StringComparison.Ordinal)).Select(row => string.Join(',', row.Trim('|').Split('|').Select(cell => cell.Trim())) + "\n"));
        string study = Audits.Pairs("subject: person\nmatch-on: [{column: age, within: 2}]", "tolerance: drop, unmatched-at-most: 40%");
        MatchingAudit audit = Audits.Of(study, sheet);
        Assert.All(audit.AuditTable, row => Assert.Contains(lines, line => line.StartsWith($"| {row.Sample} | {WrittenName.Of(row.Disposition)} |", StringComparison.Ordinal)));
        Assert.Equal((4, 8), (audit.RowsUnmatched, audit.RowsOfInterest));
        Assert.Single(audit.BrokenGates);
        Assert.Empty(Audits.Of(study.With("40%", "50%"), sheet).BrokenGates);
    }

    private static string Published(string name) => File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Published", name)).ReplaceLineEndings("\n");

    [GeneratedRegex("```yaml\n(.*?)```", RegexOptions.Singleline)]
    private static partial Regex YamlBlock();

    [GeneratedRegex(@"^\| `([a-z-]+)` \|.*\| [a-z].*\|$", RegexOptions.Multiline)]
    private static partial Regex DispositionRow();

    [GeneratedRegex(@"^( +)# ( *(?:- \{|[a-z-]+:).*)$", RegexOptions.Multiline)]
    private static partial Regex CommentedKey();
}
