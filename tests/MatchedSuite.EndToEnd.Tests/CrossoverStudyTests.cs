using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>An invented crossover through the executable; numbers by base R 4.2.2 as named at each test.</summary>
public sealed class CrossoverStudyTests : IDisposable
{
    private static readonly double[] First = [12.1, 9.4, 11.6, 10.2, 13.3, 8.9, 10.7, 9.9, 12.0, 8.1, 11.2];
    private static readonly double[] Second = [10.3, 9.1, 9.7, 10.4, 11.5, 8.0, 11.6, 10.8, 12.9, 9.9, 10.6];
    private readonly StudyFolder _folder = new();

    public CrossoverStudyTests()
    {
        // The first six had A first; one more subject dropped out after the first period, one had A twice.
        string Rows(int i) => Invariant($"s{i},1,{(i < 6 ? "A" : "B")},{First[i]},{(First[i] > 10.5 ? 1 : 0)}\ns{i},2,{(i < 6 ? "B" : "A")},{Second[i]},{(Second[i] > 10.5 ? 1 : 0)}\n");
        _folder.Write("sheet.csv", "person,period,drug,pain,relief\n" + string.Concat(Enumerable.Range(0, 11).Select(Rows)) + "t1,1,A,9,0\nt2,1,A,9,0\nt2,2,A,9,0\n");
        _folder.Write("kinds.csv", "endpoint,kind\npain,continuous\nrelief,binary\n");
        _folder.Write("study.yaml", """
            schema: 1
            study: {name: Crossover}
            data: {samples: sheet.csv}
            design:
              kind: crossover
              subject: person
              period: {column: period, order: [1, 2]}
              treatment: {column: drug, index: A, reference: B}
            endpoints: {dictionary: kinds.csv}
            output: {folder: results}
            """);
    }

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Adjustments_by_flips_are_refused()
    {
        _folder.Change("study.yaml", "output:", "analysis: {adjust: [max-t]}\noutput:");
        Finished run = _folder.Run("check", "study.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("'max-t' flips whole sets, which no method for a design of kind 'crossover' does", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Treatment_period_and_carry_over_agree_with_base_R()
    {
        ResultsTable results = Analyse();
        int row = results.Row("pain", "A-B", "", "crossover-t");

        // lm(y ~ subject + period + treatment) and t.test(var.equal = TRUE) on half differences.
        Assert.Equal("11", results.Text(row, "n_sets"));
        Assert.Equal(0.9316666666666662, results.Number(row, "estimate"), 1e-12);
        Assert.Equal(3.49512313711185385, results.Number(row, "statistic"), 1e-10);
        Assert.Equal(0.006775300853234128, results.Number(row, "p_value"), 1e-12);
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        double Of(string quantity) => details.Number("pain", "A-B", "crossover-t", quantity);
        Assert.Equal(-0.15166666666666639, Of("period-effect"), 1e-12);
        Assert.Equal(0.58329194346300206, Of("period-p"), 1e-12);
        Assert.Equal(-0.75467157970154608, Of("period-effect-low"), 1e-12);

        // t.test(var.equal = TRUE) on the subjects' totals.
        Assert.Equal(-0.48731435908553739, Of("carry-over-t"), 1e-12);
        Assert.Equal(0.63768510407634493, Of("carry-over-p"), 1e-12);
    }

    [Fact]
    public void Yes_and_no_are_tested_on_subjects_whose_periods_differ()
    {
        ResultsTable results = Analyse();
        int row = results.Row("relief", "A-B", "", "mainland-gart");

        // Of those with A first 2 had relief in period 1 alone, of those with B first 1 in period 2 alone: the table 2, 0 / 0, 1,
        // whose one-sided p by fisher.test is 1/3.
        Assert.Equal(2, results.Number(row, "statistic"));
        Assert.Equal(2.0 / 3, results.Number(row, "p_value"), 1e-12);
        Assert.Contains("exact", results.Text(row, "flags"), StringComparison.Ordinal);
    }

    [Fact]
    public void The_audit_counts_sequences_and_the_summary_warns_of_carry_over()
    {
        Analyse();
        string matching = _folder.Read("results/audit/matching.md");
        Assert.Contains("| A then B | 6 |", matching, StringComparison.Ordinal);
        Assert.Contains("sequence-unclear", matching, StringComparison.Ordinal);
        Assert.Contains("do not choose the analysis by it", _folder.Read("results/summary.md"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("order: [1, 2]", "order: [1, 3]", "'3'")]
    [InlineData("reference: B", "reference: C", "'C'")]
    [InlineData("output:", "analysis: {continuous: [paired-t]}\noutput:", "'crossover-t'")]
    public void Bad_crossovers_are_refused_with_one_message(string found, string replacement, string named)
    {
        _folder.Change("study.yaml", found, replacement);
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(named, Assert.Single(run.Error.Split('\n', StringSplitOptions.RemoveEmptyEntries)), StringComparison.Ordinal);
        Assert.False(Directory.Exists(_folder.At("results")));
    }

    private ResultsTable Analyse()
    {
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return _folder.Results();
    }

    private static string Invariant(FormattableString text) => FormattableString.Invariant(text);
}
