using CsCheck;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests.Definition;

/// <summary>A study file that is not understood is refused with file, line, column, key, what was found, what was expected and what to do.</summary>
public class StudyRefusalTests
{
    [Theory]
    [InlineData("adjust: [holm, bh]", "adjustt: [holm, bh]", "study.yaml, line 42, column 3, key 'analysis.adjustt'", "the key is not known", "Did you mean 'adjust'?")]
    [InlineData("alpha: 0.01", "alpha: 1.5", "study.yaml, line 44, column 10, key 'analysis.alpha'", "1.5 is not allowed here", "a number above 0 and below 1")]
    [InlineData("alpha: 0.01", "alpha: small", "key 'analysis.alpha'", "'small' is no number", "a number above 0 and below 1")]
    [InlineData("alpha: 0.01", "alpha: '0.01'", "key 'analysis.alpha'", "the text '0.01' in quotes is no number", "a number")]
    [InlineData("resamples: 999", "resamples: 0", "key 'analysis.resamples'", "0 is not allowed here", "a whole number from 1 to")]
    [InlineData("minimum-sets: 5", "minimum-sets: 1", "key 'analysis.minimum-sets'", "1 is not allowed here", "a whole number from 2 to")]
    [InlineData("set: twin_pair", "set: [twin_pair]", "key 'design.set'", "a list stands here", "the name of a column")]
    [InlineData("set: twin_pair", "set:", "key 'design.set'", "nothing stands here", "the name of a column")]
    [InlineData("  set: twin_pair\n", "", "key 'design.set'", "the key is missing", "since the kind is 'pairs'")]
    [InlineData("adjust: [holm, bh]", "adjust: holm", "key 'analysis.adjust'", "the text 'holm' stands here", "Write it as a list: [holm].")]
    [InlineData("adjust: [holm, bh]", "adjust: [holm, holm]", "line 42, column 18, key 'analysis.adjust'", "'holm' stands in the list twice", "Remove one")]
    [InlineData("adjust: [holm, bh]", "adjust: [hulm]", "key 'analysis.adjust'", "'hulm' is not known", "Did you mean 'holm'?")]
    [InlineData("kind: pairs", "kind: Pairs", "key 'design.kind'", "'Pairs' is not known", "Did you mean 'pairs'?")]
    [InlineData("report: false", "report: no", "key 'output.report'", "the text 'no' stands here", "true or false")]
    [InlineData("schema: 1\n", "schema: 2\n", "line 1, column 9, key 'schema'", "this version of the study file is not known", "1")]
    [InlineData("schema: 1\n", "", "key 'schema'", "the key is missing", "Write schema: 1")]
    [InlineData("unmatched-at-most: 5%", "unmatched-at-most: 500%", "key 'gates.unmatched-at-most'", "500% is not allowed here", "0% to 100%")]
    [InlineData("gamma: true", "gama: true", "key 'analysis.sensitivity.gama'", "the key is not known", "Did you mean 'gamma'?")]
    [InlineData("column: age", "colunm: age", "key 'design.match-on[1].colunm'", "the key is not known", "Did you mean 'column'?")]
    [InlineData("gates:\n", "gates:\n  alpha: 0.1\n", "key 'gates.alpha'", "the key is not known", "The key 'analysis.alpha' exists")]
    [InlineData("continuous: [paired-t, signed-rank]", "continuous: [pared-t]", "key 'analysis.continuous'", "the method 'pared-t' is not known", "Did you mean 'paired-t'?")]
    [InlineData("continuous: [paired-t, signed-rank]", "continuous: [mcnemar]", "key 'analysis.continuous'", "the method 'mcnemar' is not for continuous endpoints", "'paired-t'")]
    [InlineData("continuous: [paired-t, signed-rank]", "continuous: [friedman]", "key 'analysis.continuous'", "the method 'friedman' is not for a design of kind 'pairs'", "'paired-t'")]
    [InlineData("continuous: [paired-t, signed-rank]", "continuous: [within-pair-slope]", "key 'analysis.continuous'", "is for a measured exposure, and the design has a role", "'paired-t'")]
    public void A_refusal_says_where_what_and_how(string passage, string replacement, params string[] pieces) =>
        RefusedWith(StudyTexts.Pairs.With(passage, replacement), pieces);

    [Theory]
    [InlineData("reference: no}", "reference: yes}", "key 'design.role.reference'", "index and reference are both 'yes'")]
    [InlineData("stratum: zygosity", "stratum: zygosity\n  exposure: {column: hours}", "key 'design.exposure'", "both 'role' and 'exposure'")]
    [InlineData("  role: {column: shift_work, index: yes, reference: no}\n", "", "key 'design.role'", "'role' or 'exposure', since the kind is 'pairs'")]
    [InlineData("stratum: zygosity", "visit: {column: v, order: [a, b]}", "key 'design.visit'", "a design of kind 'pairs' has no 'visit'", "'visits', 'change-by-arm'")]
    [InlineData("  values: panel.parquet\n", "", "key 'data.values'", "since the layout is 'endpoint-rows'")]
    [InlineData("  sample: sample_id\n", "", "key 'data.sample'", "since the measurements stand in a file of their own")]
    [InlineData("  layout: endpoint-rows\n", "", "key 'data.endpoint'", "the layout 'sample-rows' has no column of endpoints")]
    [InlineData("delimiter: \";\"", "delimiter: \",\"", "key 'data.decimal'", "the comma is both delimiter and decimal mark")]
    [InlineData("covariates: [bmi, smoking]", "covariates: [bmi, shift_work]", "key 'design.covariates'", "the column 'shift_work' is already the role")]
    [InlineData("covariates: [bmi, smoking]", "covariates: [sample_id]", "key 'design.covariates'", "is the key of the sample sheet")]
    [InlineData("set: twin_pair", "set: shift_work", "key 'design.role'", "the column 'shift_work' is already the set")]
    [InlineData("set: twin_pair", "set: sample_id", "key 'design.set'", "is the key of the sample sheet")]
    [InlineData("{column: age, within: 2}", "{column: twin_pair, within: 2}", "key 'design.match-on'", "the column 'twin_pair' is already the set")]
    [InlineData("{column: age, within: 2}", "{column: sex, within: 2}", "key 'design.match-on[2].column'", "'sex' stands in the list twice")]
    [InlineData("{column: age, within: 2}", "{column: age, within: 2, equal: true}", "key 'design.match-on[1].within'", "both 'within' and 'equal' are written")]
    [InlineData("index: yes", "index: NA", "key 'design.role'", "the cell text 'NA' is read as missing", "data.missing")]
    [InlineData("folder: results", "folder: .", "key 'output.folder'", "the folder holds 'study.yaml'", "a folder of its own")]
    [InlineData("folder: results", "folder: ..", "key 'output.folder'", "the folder holds 'study.yaml'")]
    [InlineData("across: none", "across: contrasts", "key 'analysis.across'", "a design of kind 'pairs' has one contrast")]
    public void An_impossible_combination_is_refused(string passage, string replacement, params string[] pieces) =>
        RefusedWith(StudyTexts.Pairs.With("family: by-family", "family: by-family\n  across: none").With(passage, replacement), pieces);

    [Theory]
    [InlineData("reference: baseline\n", "reference: month3\n", "key 'design.visit.reference'", "'month3' is not in the order", "'baseline', 'month6', 'year1'")]
    [InlineData("visit: month6", "visit: month7", "key 'design.visit.window.limits[1].visit'", "'month7' is not in the order")]
    [InlineData("from: 150", "from: 250", "key 'design.visit.window.limits[1].to'", "the last day is before the first")]
    [InlineData("value: result", "value: marker", "key 'data.value'", "the same column is named twice")]
    public void An_impossible_visit_is_refused(string passage, string replacement, params string[] pieces) =>
        RefusedWith(StudyTexts.Visits.With(passage, replacement), pieces);

    [Theory]
    [InlineData("", "study.yaml: the file is empty")]
    [InlineData("# nothing but a comment\n", "the file is empty")]
    [InlineData("- a\n- b\n", "the file holds a list")]
    [InlineData("pairs\n", "the file holds the text 'pairs'")]
    [InlineData("schema: 1\nstudy: {name: a\ndata: 3\n", "study.yaml, line 3", "not valid YAML")]
    [InlineData("schema: 1\nstudy:\n\tname: a\n", "line 3, column", "not valid YAML")]
    [InlineData("schema: 1\nschema: 1\n", "study.yaml, line 2, column 1, key 'schema'", "the key is written twice, first on line 1")]
    [InlineData("schema: 1\nstudy:\n  name: a\n  name: b\n", "line 4, column 3, key 'study.name'", "written twice, first on line 3")]
    [InlineData("schema: 1\n---\nschema: 1\n", "a second document begins here", "one document")]
    [InlineData("schema: &one 1\n", "the anchor '&one'")]
    [InlineData("schema: *one\n", "the alias '*one'")]
    [InlineData("schema: !!int 1\n", "the tag")]
    [InlineData("[a, b]: 1\n", "a list or mapping stands where a key belongs")]
    public void A_text_that_is_no_study_file_is_refused(string text, params string[] pieces) => RefusedWith(text, pieces);

    [Fact]
    public void Values_nested_too_deeply_are_refused_instead_of_exhausting_the_stack() =>
        RefusedWith("schema: " + new string('[', 100_000), "nested too deeply");

    [Fact]
    public void A_missing_file_and_a_folder_are_refused()
    {
        using var folder = new StudyFolder();
        string path = Path.Combine(folder.Path, "absent.yaml");
        Assert.Contains("there is no such file", Assert.Throws<RefusalException>(() => StudyReader.Read(path, Capabilities.Everything)).Message, StringComparison.Ordinal);
        Assert.Contains("this is a folder", Assert.Throws<RefusalException>(() => StudyReader.Read(folder.Path, Capabilities.Everything)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_file_in_another_encoding_or_of_another_size_is_refused()
    {
        using var folder = new StudyFolder();
        string path = Path.Combine(folder.Path, "study.yaml");
        File.WriteAllBytes(path, [.. "study: {name: Zw"u8, 0xF6, .. "lf}"u8]);
        Assert.Contains("not UTF-8", Assert.Throws<RefusalException>(() => StudyReader.Read(path, Capabilities.Everything)).Message, StringComparison.Ordinal);
        File.WriteAllBytes(path, new byte[(4 << 20) + 1]);
        Assert.Contains("larger than 4 MiB", Assert.Throws<RefusalException>(() => StudyReader.Read(path, Capabilities.Everything)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Whatever_is_written_the_file_is_read_or_refused_and_nothing_else_happens() =>
        Gen.Select(Gen.Int[0, StudyTexts.Pairs.Length - 1], Gen.Int[0, 12], Gen.Char["{}[]:,-#&*!|>'\"%@`\t\n x1"].Array[0, 4]).Sample(
            (start, length, inserted) =>
            {
                int end = Math.Min(StudyTexts.Pairs.Length, start + length);
                string text = string.Concat(StudyTexts.Pairs.AsSpan(0, start), inserted, StudyTexts.Pairs.AsSpan(end));
                try
                {
                    Assert.Equal(text, StudyFolder.Read(text).Text);
                }
                catch (RefusalException refusal)
                {
                    Assert.StartsWith("study.yaml", refusal.Where, StringComparison.Ordinal);
                }
            },
            iter: 1000,
            threads: 1);

    private static void RefusedWith(string text, params string[] pieces)
    {
        string message = StudyFolder.Refusal(text).Message;
        Assert.All(pieces, piece => Assert.Contains(piece, message, StringComparison.Ordinal));
    }
}
