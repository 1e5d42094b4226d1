using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary><c>matched adjust</c>: p-values that come from elsewhere.</summary>
public class AdjustCommandTests
{
    private static readonly (string Method, string Reference)[] Procedures =
    [
        ("bonferroni", "bonferroni"), ("sidak", "sidak"), ("holm", "holm"), ("holm-sidak", "holm_sidak"), ("hochberg", "hochberg"), ("hommel", "hommel"),
        ("bh", "BH"), ("by", "BY"),
    ];

    [Theory]
    [InlineData("out.csv")]
    [InlineData("out.tsv")]
    [InlineData("out.parquet")]
    public void The_fifteen_p_values_of_Benjamini_and_Hochberg_agree_in_every_format(string file)
    {
        using var folder = new StudyFolder();
        File.Copy(ReferenceValues.File("bh1995_pvalues.csv"), folder.At("p.csv"));
        Finished run = folder.Run("adjust", "p.csv", "--p", "p", "--method", string.Join(',', Procedures.Select(of => of.Method)), "--out", file);
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Empty(run.Output);
        ResultsTable table = Read(folder, file);
        foreach (var (method, reference) in Procedures)
        {
            for (int i = 1; i <= 15; i++)
            {
                double expected = ReferenceValues.Of("bh1995_pvalues", $"adjust.{reference}", $"adj.{i}");
                double found = double.Parse(table.Text(i - 1, $"p_{method.Replace('-', '_')}"), CultureInfo.InvariantCulture);
                Assert.Equal(expected, found, 1e-13 * expected);
                Assert.Equal(expected <= 0.05 ? "true" : "false", table.Text(i - 1, $"rejected_{method.Replace('-', '_')}"));
            }
        }
    }

    [Fact]
    public void Columns_keep_their_order_and_every_cell_its_text()
    {
        using var folder = new StudyFolder();
        folder.Write("p.tsv", "id\t note\tp\t\"two\nlines\"\n007\t a,\"b\" \t0.0100\tx\n1e3\t\t NA\t\"\"\"q\"\"\"\n");
        Finished run = folder.Run("adjust", "p.tsv", "--p", "p", "--method", "holm");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Equal(
            "id,note,p,\"two\nlines\",p_holm,rejected_holm\n007,\" a,\"\"b\"\" \",0.0100,x,0.01,true\n1e3,, NA,\"\"\"q\"\"\",,false\n", run.Output);
        Assert.Contains("rows without a p-value: 1", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void A_p_value_below_the_range_of_doubles_keeps_its_size()
    {
        using var folder = new StudyFolder();
        folder.Write("p.csv", "id,p\na,1e-400\nb,0.25e-399\nc,0.04\nd,1e-320\n");
        Finished run = folder.Run("adjust", "p.csv", "--p", "p", "--method", "bonferroni,bh", "--quiet");
        Assert.Equal((0, ""), (run.ExitCode, run.Error));
        string[][] cells = [.. run.Output.Split('\n')[1..^1].Select(line => line.Split(','))];
        Assert.Equal(["4E-400", "1E-399", "0.16"], [cells[0][2], cells[1][2], cells[2][2]]);
        Assert.StartsWith("4E-320", cells[3][2], StringComparison.Ordinal);
        Assert.Equal(["4E-400", "5E-400", "0.04"], [cells[0][4], cells[1][4], cells[2][4]]);
    }

    [Fact]
    public void Families_are_adjusted_by_themselves_and_gates_go_from_one_to_the_next()
    {
        using var folder = new StudyFolder();
        folder.Write("p.csv", "id,family,p,weight\na,one,0.01,3\nb,two,0.001,1\nc,one,0.03,1\nd,two,0.04,1\n");
        Finished run = folder.Run("adjust", "p.csv", "--p", "p", "--family", "family", "--method", "bonferroni,gatekeeper-holm", "--out", "families.csv");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable families = ResultsTable.Read(folder.At("families.csv"));
        Assert.Equal(["0.02", "0.002", "0.06", "0.08"], Enumerable.Range(0, 4).Select(row => families.Text(row, "p_bonferroni")));
        Assert.Equal(["0.02", "0.03", "0.03", "0.04"], Enumerable.Range(0, 4).Select(row => families.Text(row, "p_gatekeeper_holm")));
        Assert.Equal(0, folder.Run("adjust", "p.csv", "--p", "p", "--weight", "weight", "--method", "weighted-bh", "--out", "weights.csv").ExitCode);
        Assert.Equal("0.006", ResultsTable.Read(folder.At("weights.csv")).Text(1, "p_weighted_bh"));
    }

    [Fact]
    public void Parquet_columns_keep_their_types()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet").ExitCode);
        Finished run = folder.Run("adjust", "results/results.parquet", "--p", "p_value", "--family", "method", "--method", "hommel", "--out", "more.parquet");
        Assert.True(run.ExitCode == 0, run.Error);
        using var before = new ParquetSharp.ParquetFileReader(folder.At("results/results.parquet"));
        using var after = new ParquetSharp.ParquetFileReader(folder.At("more.parquet"));
        int columns = before.FileMetaData.Schema.NumColumns;
        Assert.Equal(columns + 2, after.FileMetaData.Schema.NumColumns);
        for (int column = 0; column < columns; column++)
        {
            Assert.Equal(before.FileMetaData.Schema.Column(column).Name, after.FileMetaData.Schema.Column(column).Name);
            Assert.Equal(before.FileMetaData.Schema.Column(column).PhysicalType, after.FileMetaData.Schema.Column(column).PhysicalType);
        }

        Assert.Equal(0, folder.Run("adjust", "results/results.csv", "--p", "p_value", "--family", "method", "--method", "hommel", "--out", "from-text.csv").ExitCode);
        Assert.Equal(0, folder.Run("adjust", "results/results.parquet", "--p", "p_value", "--family", "method", "--method", "hommel", "--out", "from-parquet.csv").ExitCode);
        Assert.Equal(folder.Read("from-text.csv"), folder.Read("from-parquet.csv"));
    }

    [Fact]
    public void A_list_named_afterwards_has_a_bound_on_its_true_discoveries()
    {
        using var folder = new StudyFolder();
        File.Copy(ReferenceValues.File("bh1995_pvalues.csv"), folder.At("p.csv"));
        folder.Write("top.txt", "1\n2\n3\n4\n");
        folder.Write("middle.txt", "4\n5\n\n6\n7\n8\n9\n");
        // The bounds of docs/methods/true-discoveries.md.
        Assert.Equal("true discoveries among the 4 listed: at least 3 (confidence 0.95)\n", folder.Run("adjust", "p.csv", "--p", "p", "--list", "top.txt").Output);
        Assert.Equal("true discoveries among the 6 listed: at least 0 (confidence 0.95)\n", folder.Run("adjust", "p.csv", "--p", "p", "--list", "middle.txt", "--name", "rank").Output);
        folder.Write("wrong.txt", "1\n16\n");
        Assert.Contains("wrong.txt, line 2: there is no row '16' in the table", folder.Run("adjust", "p.csv", "--p", "p", "--list", "wrong.txt").Error, StringComparison.Ordinal);
        folder.Write("twice.txt", "1\n1\n");
        Assert.Contains("twice.txt, line 2: '1' is listed on line 1 already", folder.Run("adjust", "p.csv", "--p", "p", "--list", "twice.txt").Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("-0.1", "-0.1 is negative")]
    [InlineData("-1e-400", "-1e-400 is negative")]
    [InlineData("1.0001", "1.0001 is above 1")]
    [InlineData("n.s.", "'n.s.' is not a number")]
    [InlineData("0.05*", "'0.05*' is not a number")]
    [InlineData("\"0,05\"", "'0,05' is not a number")]
    [InlineData("Infinity", "'Infinity' is not a number")]
    public void A_bad_p_value_is_refused_with_its_row(string cell, string found)
    {
        using var folder = new StudyFolder();
        folder.Write("p.csv", $"id,p\na,0.01\nb,{cell}\n");
        Finished run = folder.Run("adjust", "p.csv", "--p", "p", "--out", "out.csv");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains($"p.csv, line 3, column 'p': {found}", run.Error, StringComparison.Ordinal);
        Assert.Equal(["p.csv"], Directory.EnumerateFileSystemEntries(folder.Path).Select(Path.GetFileName));
    }

    [Theory]
    [InlineData("there is no column 'pvalue'", "--p", "pvalue")]
    [InlineData("Did you mean 'holm'?", "--p", "p", "--method", "hulm")]
    [InlineData("'max-t' needs more than p-values", "--p", "p", "--method", "max-t")]
    [InlineData("Add --family COLUMN", "--p", "p", "--method", "gatekeeper-holm")]
    [InlineData("Add --weight COLUMN", "--p", "p", "--method", "weighted-bh")]
    [InlineData("line 3, column 'id': 'b' is not a number", "--p", "p", "--weight", "id")]
    [InlineData("a name that ends in .csv, .tsv or .parquet", "--p", "p", "--out", "out.xlsx")]
    [InlineData("inputs are never replaced", "--p", "p", "--out", "p.csv")]
    [InlineData("there is a column 'p_bh' already", "--p", "p", "--method", "bh")]
    public void What_cannot_be_done_is_said_in_one_message(string found, params string[] arguments)
    {
        using var folder = new StudyFolder();
        folder.Write("p.csv", "p_bh,id,p\n,1,0.01\n,b,0.02\n");
        Finished run = folder.Run(["adjust", "p.csv", .. arguments.Contains("--method") ? arguments : [.. arguments, "--method", "holm"]]);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(found, run.Error, StringComparison.Ordinal);
        Assert.Empty(run.Output);
        Assert.Equal(["p.csv"], Directory.EnumerateFileSystemEntries(folder.Path).Select(Path.GetFileName));
    }

    private static ResultsTable Read(StudyFolder folder, string file)
    {
        if (file.EndsWith(".csv", StringComparison.Ordinal))
            return ResultsTable.Read(folder.At(file));
        // Another format goes through the program once more, into the one that the tests read.
        folder.Write("plain.csv", folder.Run("adjust", file, "--p", "p", "--method", "storey-q", "--quiet").Output);
        return ResultsTable.Read(folder.At("plain.csv"));
    }
}
