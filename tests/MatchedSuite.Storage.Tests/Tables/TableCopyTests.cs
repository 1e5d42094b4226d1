using MatchedSuite.Storage.Tables;
using ParquetSharp;

namespace MatchedSuite.Storage.Tests.Tables;

/// <summary>A copied table keeps what it had; Parquet is read back by an independent reader.</summary>
public sealed class TableCopyTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Parquet_columns_of_every_type_keep_type_and_values()
    {
        DateTime?[] moments = [new DateTime(2026, 3, 1, 12, 30, 15, DateTimeKind.Unspecified), null, new DateTime(1999, 12, 31, 0, 0, 0, DateTimeKind.Unspecified)];
        Column[] columns =
        [
            new Column<double?>("d"), new Column<float>("f"), new Column<long?>("l"), new Column<short>("s"), new Column<bool?>("b"),
            new Column<string>("t"), new Column<DateTime?>("m", LogicalType.Timestamp(isAdjustedToUtc: false, TimeUnit.Micros)), new Column<Date>("day"),
        ];
        using (var writer = new ParquetFileWriter(_folder.File("in.parquet"), columns))
        {
            using RowGroupWriter group = writer.AppendRowGroup();
            Write<double?>(group, [0.1, null, double.MaxValue]);
            Write<float>(group, [0.1f, 2, 3]);
            Write<long?>(group, [long.MaxValue, null, 3]);
            Write<short>(group, [1, -2, 3]);
            Write<bool?>(group, [true, null, false]);
            Write<string>(group, ["a", null!, " c "]);
            Write(group, moments);
            Write<Date>(group, [new Date(2026, 3, 1), new Date(1970, 1, 1), new Date(1, 1, 1)]);
            writer.Close();
        }

        TableCopy.Write(_folder.File("in.parquet"), TextDialect.Usual, Added(3), _folder.File("out.parquet"));
        using var reader = new ParquetFileReader(_folder.File("out.parquet"));
        using RowGroupReader rows = reader.RowGroup(0);
        Assert.Equal([0.1, null, double.MaxValue], Read<double?>(rows, 0));
        Assert.Equal([0.1f, 2, 3], Read<float>(rows, 1));
        Assert.Equal([long.MaxValue, null, 3], Read<long?>(rows, 2));
        Assert.Equal([1, -2, 3], Read<short>(rows, 3));
        Assert.Equal([true, null, false], Read<bool?>(rows, 4));
        Assert.Equal(["a", null!, " c "], Read<string>(rows, 5));
        Assert.Equal(moments, Read<DateTime?>(rows, 6));
        Assert.Equal([new Date(2026, 3, 1), new Date(1970, 1, 1), new Date(1, 1, 1)], Read<Date>(rows, 7));
        Assert.Equal([0.5, null, 0.25], Read<double?>(rows, 8));
        Assert.Equal([true, false, true], Read<bool>(rows, 9));
    }

    [Fact]
    public void Text_keeps_blanks_quotes_line_ends_and_the_digits_as_written()
    {
        string source = _folder.Write("in.csv", "id; x ;y\r\n007;  two words ;1,50\r\n\"a;b\";\"say \"\"yes\"\"\";\"two\r\nlines\"\r\nNA;;.\r\n");
        TableCopy.Write(source, TextDialect.Usual, Added(3), _folder.File("out.tsv"));
        Assert.Equal(
            "id\tx\ty\tq\tok\n007\t  two words \t1,50\thalf\ttrue\na;b\t\"say \"\"yes\"\"\"\t\"two\r\nlines\"\t\tfalse\nNA\t\t.\tquarter\ttrue\n",
            File.ReadAllText(_folder.File("out.tsv")));
    }

    [Fact]
    public void Text_goes_to_Parquet_as_text()
    {
        string source = _folder.Write("in.csv", "id,x\n007,1.50\n8,\n9,NA\n");
        TableCopy.Write(source, TextDialect.Usual, Added(3), _folder.File("out.parquet"));
        using var reader = new ParquetFileReader(_folder.File("out.parquet"));
        using RowGroupReader rows = reader.RowGroup(0);
        Assert.Equal(["007", "8", "9"], Read<string>(rows, 0));
        Assert.Equal(["1.50", "", "NA"], Read<string>(rows, 1));
        Assert.Equal([0.5, null, 0.25], Read<double?>(rows, 2));
    }

    [Fact]
    public void A_failed_copy_leaves_the_older_file_and_nothing_else()
    {
        string source = _folder.Write("in.csv", "id,x\n1,2\n3\n");
        _folder.Write("out.csv", "older");
        Assert.Throws<RefusalException>(() => TableCopy.Write(source, TextDialect.Usual, Added(2), _folder.File("out.csv")));
        Assert.Equal("older", File.ReadAllText(_folder.File("out.csv")));
        Assert.Equal(2, Directory.EnumerateFileSystemEntries(_folder.Path).Count());
    }

    private static AddedColumn[] Added(int rows)
    {
        double[] numbers = [0.5, double.NaN, 0.25];
        string[] texts = ["half", "", "quarter"];
        bool[] truths = [true, false, true];
        return [new AddedColumn("q", numbers[..rows], row => texts[row]), new AddedColumn("ok", truths[..rows])];
    }

    private static void Write<T>(RowGroupWriter group, T[] values)
    {
        using LogicalColumnWriter<T> column = group.NextColumn().LogicalWriter<T>();
        column.WriteBatch(values);
    }

    private static T[] Read<T>(RowGroupReader rows, int column)
    {
        using LogicalColumnReader<T> reader = rows.Column(column).LogicalReader<T>();
        return reader.ReadAll(3);
    }
}
