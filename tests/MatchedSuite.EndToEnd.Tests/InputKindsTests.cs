using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;
using ParquetSharp;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>One study written in every accepted way gives the same bytes.</summary>
public class InputKindsTests
{
    private static readonly string[][] Panel = [.. SmallStudy.Panel.Trim().Split('\n').Select(line => line.Split(','))];

    [Fact]
    public void Tabs_and_decimal_commas_change_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        string expected = Results(folder);
        folder.Write("panel.tsv", SmallStudy.Panel.Replace(',', '\t'));
        folder.Change("study.yaml", "panel.csv", "panel.tsv");
        Assert.Equal(expected, Results(folder));

        string[] lines = [.. Panel.Select(cells => string.Join(';', cells.Select(cell => cell.Replace('.', ','))))];
        folder.Write("panel.tsv", "\uFEFF" + string.Join("\r\n", lines) + "\r\n");
        folder.Write("samples.csv", folder.Read("samples.csv").Replace(',', ';'));
        folder.Change("study.yaml", "endpoint: marker}", "endpoint: marker, decimal: \",\"}");
        Assert.Equal(expected, Results(folder));
    }

    [Fact]
    public void Rows_of_samples_in_the_sheet_itself_change_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        string expected = Results(folder);
        string[] sheet = folder.Read("samples.csv").Trim().Split('\n');
        folder.Write("samples.csv", sheet[0] + "," + string.Join(',', Panel.Skip(1).Select(row => row[0])) + "\n"
            + string.Concat(sheet.Skip(1).Select((line, sample) => line + "," + string.Join(',', Panel.Skip(1).Select(row => row[sample + 1])) + "\n")));
        folder.Change("study.yaml", ", values: panel.csv, layout: endpoint-rows, endpoint: marker}", "}");
        Assert.Equal(expected, Results(folder));
    }

    [Fact]
    public void Parquet_with_a_row_an_endpoint_changes_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        string expected = Results(folder);
        Column[] columns = [new Column<string>("marker"), .. Panel[0].Skip(1).Select(name => new Column<double?>(name))];
        using (var file = new ParquetFileWriter(folder.At("panel.parquet"), columns))
        {
            using RowGroupWriter group = file.AppendRowGroup();
            group.NextColumn().LogicalWriter<string>().WriteBatch([.. Panel.Skip(1).Select(row => row[0])]);
            for (int sample = 1; sample < Panel[0].Length; sample++)
                group.NextColumn().LogicalWriter<double?>().WriteBatch([.. Panel.Skip(1).Select(row => Number(row[sample]))]);
            file.Close();
        }

        folder.Change("study.yaml", "panel.csv", "panel.parquet");
        Assert.Equal(expected, Results(folder));
    }

    [Fact]
    public void Parquet_with_a_row_a_sample_changes_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        string expected = Results(folder);
        Column[] columns = [new Column<string>("id"), .. Panel.Skip(1).Select(row => new Column<double?>(row[0]))];
        using (var file = new ParquetFileWriter(folder.At("panel.parquet"), columns))
        {
            using RowGroupWriter group = file.AppendRowGroup();
            group.NextColumn().LogicalWriter<string>().WriteBatch([.. Panel[0].Skip(1)]);
            foreach (string[] row in Panel.Skip(1))
                group.NextColumn().LogicalWriter<double?>().WriteBatch([.. row.Skip(1).Select(Number)]);
            file.Close();
        }

        folder.Change("study.yaml", "panel.csv, layout: endpoint-rows, endpoint: marker", "panel.parquet");
        folder.Write("samples.csv", folder.Read("samples.csv").Replace("sample,pair", "id,pair", StringComparison.Ordinal));
        folder.Change("study.yaml", "sample: sample", "sample: id");
        Assert.Equal(expected, Results(folder));
    }

    private static double? Number(string cell) => cell is "" or "NA" ? null : double.Parse(cell, CultureInfo.InvariantCulture);

    private static string Results(StudyFolder folder)
    {
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return folder.Read("results/results.csv");
    }
}
