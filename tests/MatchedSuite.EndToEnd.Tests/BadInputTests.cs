using System.Text;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Every way an input can be bad: one message that says where, what, what was expected; exit code 2; nothing written.</summary>
public class BadInputTests
{
    // What is done to the small study, and what the message must name.
    private static readonly Dictionary<string, (Action<StudyFolder> Break, string[] Named)> Cases = new()
    {
        ["study file missing"] = (f => File.Delete(f.At("study.yaml")), ["study.yaml"]),
        ["study file empty"] = (f => f.Write("study.yaml", ""), ["study.yaml", "empty"]),
        ["yaml syntax"] = (f => f.Change("study.yaml", "{name: small}", "{name: small"), ["study.yaml", "line"]),
        ["yaml duplicate key"] = (f => f.Change("study.yaml", "schema: 1", "schema: 1\nschema: 1"), ["study.yaml", "line 2", "schema"]),
        ["misspelt key"] = (f => f.Change("study.yaml", "adjust:", "adjusst:"), ["study.yaml", "line 8", "adjusst", "'adjust'"]),
        ["unknown method"] = (f => f.Change("study.yaml", "signed-rank", "signed-rang"), ["study.yaml", "signed-rang", "signed-rank"]),
        ["method of later work"] = (f => f.Change("study.yaml", "signed-rank", "conditional-logistic"), ["conditional-logistic", "paired-t"]),
        ["sample sheet missing"] = (f => File.Delete(f.At("samples.csv")), ["samples.csv"]),
        ["folder instead of file"] = (f => { File.Delete(f.At("panel.csv")); Directory.CreateDirectory(f.At("panel.csv")); }, ["panel.csv", "folder"]),
        ["empty values"] = (f => f.Write("panel.csv", ""), ["panel.csv", "empty"]),
        ["empty sheet"] = (f => f.Write("samples.csv", ""), ["samples.csv", "empty"]),
        ["values with a header only"] = (f => f.Write("panel.csv", f.Read("panel.csv").Split('\n')[0] + "\n"), ["panel.csv"]),
        ["sheet with a header only"] = (f => f.Write("samples.csv", "sample,pair,exposed\n"), ["samples.csv"]),
        ["text in a number"] = (f => f.Change("panel.csv", "il6,5,4.1", "il6,5,n.d."), ["panel.csv", "line 3", "il6", "s1b", "n.d."]),
        ["infinite value"] = (f => f.Change("panel.csv", "il6,5,4.1", "il6,5,1e999"), ["panel.csv", "line 3", "il6", "s1b", "1e999"]),
        ["infinity in words"] = (f => f.Change("panel.csv", "il6,5,4.1", "il6,Infinity,4.1"), ["panel.csv", "line 3", "il6", "s1a"]),
        ["ragged row"] = (f => f.Change("panel.csv", "il6,5,4.1", "il6,5"), ["panel.csv", "line 3"]),
        ["duplicate column of values"] = (f => f.Change("panel.csv", "s2a", "s1a"), ["panel.csv", "s1a"]),
        ["duplicate column of the sheet"] = (f => f.Change("samples.csv", "sample,pair,exposed", "sample,pair,pair"), ["samples.csv", "pair"]),
        ["duplicate sample"] = (f => f.Change("samples.csv", "s2a,", "s1a,"), ["samples.csv", "s1a"]),
        ["duplicate endpoint"] = (f => f.Change("panel.csv", "tnf,", "crp,"), ["panel.csv", "crp"]),
        ["sample of the values not in the sheet"] = (f => f.Change("samples.csv", "s8b,p8,no\n", ""), ["s8b"]),
        ["no sample of the sheet in the values"] = (f => f.Write("samples.csv", f.Read("samples.csv").Replace("\ns", "\nx", StringComparison.Ordinal)), ["samples.csv"]),
        ["no complete pair"] = (f => f.Write("samples.csv", NoPairs()), ["samples.csv"]),
        ["set with three members"] = (f => f.Change("samples.csv", "s2a,p2,yes", "s2a,p1,yes"), ["p1"]),
        ["index value that never occurs"] = (f => f.Change("study.yaml", "\"yes\"", "exposed"), ["exposed", "yes", "no"]),
        ["reference value that never occurs"] = (f => f.Change("study.yaml", "\"no\"", "never"), ["never", "yes", "no"]),
        ["column absent"] = (f => f.Change("study.yaml", "set: pair", "set: pairs"), ["samples.csv", "pairs", "'pair'"]),
        ["endpoint column absent"] = (f => f.Change("study.yaml", "endpoint: marker", "endpoint: markers"), ["panel.csv", "markers", "'marker'"]),
        ["wrong encoding"] = (f => File.WriteAllBytes(f.At("panel.csv"), Encoding.Latin1.GetBytes(f.Read("panel.csv").Replace("il6", "il6µ", StringComparison.Ordinal))), ["panel.csv", "line 3", "UTF-8"]),
        ["no endpoint left"] = (f => f.Change("study.yaml", "analysis:", "endpoints: {exclude: [\"*\"]}\nanalysis:"), ["panel.csv"]),
        ["binary value out of kind"] = (f => f.Change("study.yaml", "analysis:", "endpoints: {kind: binary}\nanalysis:"), ["panel.csv", "crp", "binary"]),
        ["value too large to be squared"] = (f => f.Change("panel.csv", "il6,5,4.1", "il6,5,-4e200"), ["panel.csv", "il6", "s1b", "1e100"]),
        ["unclosed quote"] = (f => f.Change("panel.csv", "il6,", "\"il6,"), ["panel.csv"]),
        ["parquet cut short"] = (f => { f.Change("study.yaml", "panel.csv", "panel.parquet"); File.WriteAllText(f.At("panel.parquet"), "PAR1 and then nothing"); }, ["panel.parquet", "Parquet"]),
    };

    // What is done to the small study of matched sets.
    private static readonly Dictionary<string, (Action<StudyFolder> Break, string[] Named)> CasesOfSets = new()
    {
        ["no set with both roles"] = (f => f.Write("samples.csv", f.Read("samples.csv").Replace(",control,", ",other,", StringComparison.Ordinal) + "x,r99,px,control,east,40,no\n"), ["samples.csv", "no set has a sample in both roles"]),
        ["case value that never occurs"] = (f => f.Change("study.yaml", "index: case", "index: patient"), ["'patient'", "'case', 'control'"]),
        ["a person with both roles"] = (f => f.Change("samples.csv", "s1b,r1,ps1b", "s1b,r1,ps1a"), ["line 2", "line 3", "'ps1a' has both roles of the set 'r1'"]),
        ["a person twice in a set"] = (f => f.Change("samples.csv", "s2c,r2,ps2c", "s2c,r2,ps2b"), ["the set 'r2' has 2 samples of 'ps2b'", "design.replicates"]),
        ["one sample in two sets"] = (f => f.Write("samples.csv", f.Read("samples.csv") + "s1b,r2,ps1b,control,east,41,no\n"), ["s1b", "every sample once"]),
        ["one sample twice in a set"] = (f => { f.Change("study.yaml", "  subject: person", "  subject: person\n  reuse: allowed"); f.Write("samples.csv", f.Read("samples.csv") + "s1b,r1,ps1b,control,east,41,no\n"); }, ["s1b", "every sample once in a set"]),
        ["a method for pairs"] = (f => f.Change("study.yaml", "aligned-rank", "signed-rank"), ["'signed-rank' is not for a design of kind 'sets'"]),
        ["a key of pairs"] = (f => f.Change("study.yaml", "  subject: person", "  subject: person\n  person-time: age"), ["'design.person-time' is not available in this version for this kind of design, only for 'pairs'"]),
        ["a rule for zeros"] = (f => f.Change("study.yaml", "adjust: [", "zeros: pratt, adjust: ["), ["'analysis.zeros'", "only for 'pairs'"]),
        ["a sign that is none"] = (f => { f.Change("study.yaml", "analysis: {continuous: [conditional-logistic, within-set-linear, aligned-rank, set-relabel]", "endpoints: {kind: binary}\nanalysis: {binary: [mantel-haenszel]"); }, ["panel.csv", "'crp'", "binary"]),
        ["an adjustment by sign flips"] = (f => f.Change("study.yaml", "adjust: [bonferroni", "adjust: [min-p"), ["'min-p' flips signs, and a design of kind 'sets' exchanges labels instead", "'max-t'"]),
        ["relabelings beside covariates"] = (f => { f.Change("study.yaml", "adjust: [bonferroni", "adjust: [max-t"); f.Change("study.yaml", "  subject: person", "  subject: person\n  covariates: [smoking]"); }, ["'max-t' exchanges labels over values as they are", "design.covariates"]),
        ["a covariate that is not there"] = (f => f.Change("study.yaml", "  subject: person", "  subject: person\n  covariates: [weight]"), ["samples.csv", "'weight'"]),
        ["text in a column matched within"] = (f => { f.Change("study.yaml", "  subject: person", "  subject: person\n  match-on: [{column: age, within: 2}]"); f.Change("samples.csv", "east,42,", "east,old,"); }, ["samples.csv", "'old' is not a number"]),
    };

    public static TheoryData<string> NamesOfSets => [.. CasesOfSets.Keys];

    public static TheoryData<string> Names => [.. Cases.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void One_message_exit_code_2_and_nothing_written(string name)
    {
        using StudyFolder folder = StudyFolder.Small();
        RequireOneMessage(folder, Cases[name]);
    }

    [Theory]
    [MemberData(nameof(NamesOfSets))]
    public void Matched_sets_one_message_exit_code_2_and_nothing_written(string name)
    {
        using StudyFolder folder = SmallSets.Folder();
        RequireOneMessage(folder, CasesOfSets[name]);
    }

    private static void RequireOneMessage(StudyFolder folder, (Action<StudyFolder> Break, string[] Named) @case)
    {
        @case.Break(folder);

        Finished run = folder.Run("analyze", "study.yaml");

        Assert.True(run.ExitCode == 2, $"exit code {run.ExitCode}: {run.Error}");
        string message = Assert.Single(run.Error.Split('\n', StringSplitOptions.RemoveEmptyEntries));
        Assert.StartsWith("matched: error: ", message, StringComparison.Ordinal);
        Assert.Contains("xpected ", message, StringComparison.Ordinal);
        Assert.All(@case.Named, named => Assert.Contains(named, message, StringComparison.Ordinal));
        Assert.Empty(run.Output);
        Assert.DoesNotContain(Directory.EnumerateFileSystemEntries(folder.Path).Select(Path.GetFileName), IsOurs);
    }

    [Fact]
    public void The_small_study_itself_is_sound()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
    }

    [Fact]
    public void A_logarithm_of_zero_is_counted_and_flagged_or_refused_when_strict()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "analysis:", "endpoints: {transform: log}\nanalysis:");
        folder.Change("panel.csv", "il6,5,4.1,3.9", "il6,0,4.1,-3.9");

        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Contains("2 in 1 of 4 endpoints", run.Error, StringComparison.Ordinal);
        Assert.Contains("transform-undefined", folder.Results().Text("il6", "paired-t", "flags"), StringComparison.Ordinal);
        Assert.Equal("6", folder.Results().Text("il6", "paired-t", "n_sets"));

        Finished strict = folder.Run("analyze", "study.yaml", "--strict", "--out", "strict");
        Assert.Equal(2, strict.ExitCode);
        Assert.False(Directory.Exists(folder.At("strict")));
    }

    [Fact]
    public void A_sample_of_the_sheet_that_was_not_measured_is_counted_or_refused_when_strict()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("samples.csv", folder.Read("samples.csv") + "s9a,p9,yes\ns9b,p9,no\n");

        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Contains("warning", run.Error, StringComparison.Ordinal);
        Assert.Equal(2, folder.Run("analyze", "study.yaml", "--strict").ExitCode);
    }

    [Fact]
    public void A_folder_that_cannot_be_written_is_named()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("blocked", "a file, not a folder");
        Finished run = folder.Run("analyze", "study.yaml", "--out", "blocked/results");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("blocked", run.Error, StringComparison.Ordinal);
    }

    private static bool IsOurs(string? name) => name == "results" || name!.StartsWith('.');

    private static string NoPairs() => "sample,pair,exposed\n" + string.Concat(
        Enumerable.Range(1, 8).Select(pair => $"s{pair}a,p{pair},yes\ns{pair}b,q{pair},no\n"));
}
