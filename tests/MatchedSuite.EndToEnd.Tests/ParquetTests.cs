using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;
using ParquetSharp;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>results.parquet read by another library than the one that wrote it.</summary>
public class ParquetTests
{
    [Fact]
    public void Parquet_and_CSV_hold_the_same_rows()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        ResultsTable csv = folder.Results();
        using var file = new ParquetFileReader(folder.At("results/results.parquet"));
        Assert.Equal(csv.Rows, file.FileMetaData.NumRows);
        Assert.Equal(csv.Columns, Enumerable.Range(0, file.FileMetaData.NumColumns).Select(column => file.FileMetaData.Schema.Column(column).Name));

        using RowGroupReader group = file.RowGroup(0);
        for (int column = 0; column < csv.Columns.Count; column++)
        {
            using LogicalColumnReader reader = group.Column(column).LogicalReader();
            string[] cells = Cells(reader, csv.Rows);
            for (int row = 0; row < csv.Rows; row++)
                Assert.Equal(csv.Text(row, csv.Columns[column]), cells[row]);
        }
    }

    [Fact]
    public void Dispositions_name_every_row_of_the_sheet_once()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("samples.csv", "s8b,p8,no", "s8b,,no");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        using var file = new ParquetFileReader(folder.At("results/audit/dispositions.parquet"));
        using RowGroupReader group = file.RowGroup(0);
        string[] dispositions = group.Column(4).LogicalReader<string>().ReadAll(16);
        Assert.Equal(14, dispositions.Count(disposition => disposition == "used"));
        Assert.Equal("no-partner", dispositions[14]);
        Assert.Equal("set-missing", dispositions[15]);
    }

    private static string[] Cells(LogicalColumnReader reader, int rows) => reader switch
    {
        LogicalColumnReader<string> text => [.. text.ReadAll(rows).Select(cell => cell ?? "")],
        LogicalColumnReader<int> number => [.. number.ReadAll(rows).Select(cell => cell.ToString(CultureInfo.InvariantCulture))],
        LogicalColumnReader<bool> truth => [.. truth.ReadAll(rows).Select(cell => cell ? "true" : "false")],
        LogicalColumnReader<double?> real => [.. real.ReadAll(rows).Select(cell => cell?.ToString("R", CultureInfo.InvariantCulture) ?? "")],
        _ => throw new InvalidOperationException($"A column has the type {reader.GetType()}."),
    };
}
