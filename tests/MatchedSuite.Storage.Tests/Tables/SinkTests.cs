using System.Globalization;
using MatchedSuite.Storage.Tables;
using ParquetSharp;

namespace MatchedSuite.Storage.Tests.Tables;

public sealed class SinkTests : IDisposable
{
    private static readonly TableColumn[] Schema =
    [
        new("endpoint", ColumnType.Text), new("n_sets", ColumnType.Integer), new("p_value", ColumnType.Real), new("primary", ColumnType.Truth),
    ];

    private static readonly double[] Numbers = [0.1, 1.0 / 3, 1e-300, 5e-324, -0.0, 123456789, 1e21, double.NaN, 0];

    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private static string? Name(int row) => row % 11 == 0 ? null : $"marker \"{row % 97}\", set {row % 5}";

    private static double Number(int row) => row < Numbers.Length ? Numbers[row] : row % 13 == 0 ? double.NaN : Math.Sqrt(row) / 7;

    private static void Fill(ITableSink sink, int rows, int perBatch)
    {
        var batch = new TableBatch(Schema, perBatch);
        for (int row = 0; row < rows;)
        {
            batch.Rows = Math.Min(perBatch, rows - row);
            for (int i = 0; i < batch.Rows; i++, row++)
            {
                batch.Text(0)[i] = Name(row);
                batch.Integers(1)[i] = row - 3;
                batch.Reals(2)[i] = Number(row);
                batch.Truths(3)[i] = row % 3 == 0;
            }
            sink.Write(batch);
        }
        sink.Complete();
    }

    private string Parquet(string name, int rows, int perBatch)
    {
        using (var sink = new ParquetTableSink(_folder.File(name), Schema)) Fill(sink, rows, perBatch);
        return _folder.File(name);
    }

    private string Csv(string name, int rows, int perBatch)
    {
        using (var sink = new CsvTableSink(_folder.File(name), Schema)) Fill(sink, rows, perBatch);
        return _folder.File(name);
    }

    [Fact]
    public void An_independent_reader_finds_in_Parquet_what_was_written()
    {
        const int rows = 150_000;
        using var reader = new ParquetFileReader(Parquet("results.parquet", rows, 1000));
        Assert.Equal(rows, reader.FileMetaData.NumRows);
        Assert.Equal(3, reader.FileMetaData.NumRowGroups);
        Assert.Equal(["endpoint", "n_sets", "p_value", "primary"],
            Enumerable.Range(0, 4).Select(column => reader.FileMetaData.Schema.Column(column).Name));
        int row = 0;
        for (int g = 0; g < 3; g++)
        {
            using RowGroupReader group = reader.RowGroup(g);
            Assert.Equal(Compression.Zstd, group.MetaData.GetColumnChunkMetaData(2).Compression);
            int count = checked((int)group.MetaData.NumRows);
            string?[] names = group.Column(0).LogicalReader<string?>().ReadAll(count);
            int[] sets = group.Column(1).LogicalReader<int>().ReadAll(count);
            double?[] numbers = group.Column(2).LogicalReader<double?>().ReadAll(count);
            bool[] truths = group.Column(3).LogicalReader<bool>().ReadAll(count);
            for (int i = 0; i < count; i++, row++)
            {
                Assert.Equal(Name(row), names[i]);
                Assert.Equal(row - 3, sets[i]);
                Assert.Equal(row % 3 == 0, truths[i]);
                if (double.IsNaN(Number(row))) Assert.Null(numbers[i]);
                else Assert.Equal(BitConverter.DoubleToInt64Bits(Number(row)), BitConverter.DoubleToInt64Bits(numbers[i]!.Value));
            }
        }
        Assert.Equal(rows, row);
    }

    [Fact]
    public void The_same_rows_give_the_same_bytes_whatever_the_batches()
    {
        Assert.Equal(File.ReadAllBytes(Parquet("a.parquet", 70_000, 1)), File.ReadAllBytes(Parquet("b.parquet", 70_000, 9_999)));
        Assert.Equal(File.ReadAllBytes(Csv("a.csv", 7_000, 1)), File.ReadAllBytes(Csv("b.csv", 7_000, 999)));
    }

    [Fact]
    public void A_table_without_rows_is_whole_too()
    {
        using var reader = new ParquetFileReader(Parquet("none.parquet", 0, 1));
        Assert.Equal(0, reader.FileMetaData.NumRows);
        Assert.Equal("endpoint,n_sets,p_value,primary\n", File.ReadAllText(Csv("none.csv", 0, 1)));
    }

    [Fact]
    public void Csv_is_quoted_where_needed_and_its_numbers_are_the_shortest()
    {
        string text = File.ReadAllText(Csv("results.csv", 9, 4));
        Assert.Equal(
            "endpoint,n_sets,p_value,primary\n" +
            ",-3,0.1,true\n" +
            "\"marker \"\"1\"\", set 1\",-2,0.3333333333333333,false\n" +
            "\"marker \"\"2\"\", set 2\",-1,1E-300,false\n" +
            "\"marker \"\"3\"\", set 3\",0,5E-324,true\n" +
            "\"marker \"\"4\"\", set 4\",1,-0,false\n" +
            "\"marker \"\"5\"\", set 0\",2,123456789,false\n" +
            "\"marker \"\"6\"\", set 1\",3,1E+21,true\n" +
            "\"marker \"\"7\"\", set 2\",4,,false\n" +
            "\"marker \"\"8\"\", set 3\",5,0,false\n", text);
        Assert.Equal((byte)'e', File.ReadAllBytes(_folder.File("results.csv"))[0]);
    }

    [Fact]
    public void What_was_written_is_read_back_as_the_same_text_from_both_formats()
    {
        var csv = TextTable.Read(Csv("results.csv", 500, 64), TextDialect.Usual);
        var parquet = TextTable.Read(Parquet("results.parquet", 500, 64), TextDialect.Usual);
        Assert.Equal(csv.Columns, parquet.Columns);
        foreach (string column in csv.Columns) Assert.Equal<IEnumerable<string?>>(csv[column], parquet[column]);
        Assert.Equal(Number(499), double.Parse(csv["p_value"][499]!, CultureInfo.InvariantCulture));
        Assert.Equal("results.parquet, row 500", parquet.Place(499));
    }

    [Theory]
    [InlineData("results.parquet")]
    [InlineData("results.csv")]
    public void Without_completion_no_file_is_left(string name)
    {
        string path = _folder.File(name);
        using (ITableSink sink = name.EndsWith(".csv", StringComparison.Ordinal) ? new CsvTableSink(path, Schema) : new ParquetTableSink(path, Schema))
        {
            sink.Write(new TableBatch(Schema, 4) { Rows = 4 });
            Assert.True(File.Exists(path));
        }
        Assert.False(File.Exists(path));
    }

    [Theory]
    [InlineData("results.parquet")]
    [InlineData("results.csv")]
    public void A_full_disk_is_told_with_the_name_of_the_file(string name)
    {
        string path = _folder.File(name);
        File.CreateSymbolicLink(path, "/dev/full");
        var failure = Assert.Throws<IOException>(() =>
        {
            using ITableSink sink = name.EndsWith(".csv", StringComparison.Ordinal) ? new CsvTableSink(path, Schema) : new ParquetTableSink(path, Schema);
            Fill(sink, 100_000, 1000);
        });
        Assert.StartsWith($"'{path}' cannot be written:", failure.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("results.parquet")]
    [InlineData("results.csv")]
    public void A_folder_that_is_not_there_is_told_with_the_name_of_the_file(string name)
    {
        string path = Path.Combine(_folder.File("nowhere"), name);
        var failure = Assert.Throws<IOException>(() =>
        {
            using ITableSink sink = name.EndsWith(".csv", StringComparison.Ordinal) ? new CsvTableSink(path, Schema) : new ParquetTableSink(path, Schema);
        });
        Assert.StartsWith($"'{path}' cannot be written:", failure.Message, StringComparison.Ordinal);
    }
}
