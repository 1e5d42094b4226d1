using MatchedSuite.Storage.Tables;
using MatchedSuite.Storage.Tests.Values;
using MatchedSuite.Storage.Values;
using ParquetSharp;

namespace MatchedSuite.Storage.Tests.Columnar;

public sealed class ParquetRefusalTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private string Write(string name, Column[] columns, params Action<RowGroupWriter>[] puts)
    {
        using var writer = new ParquetFileWriter(_folder.File(name), columns);
        using (RowGroupWriter group = writer.AppendRowGroup())
            foreach (Action<RowGroupWriter> put in puts) put(group);
        writer.Close();
        return _folder.File(name);
    }

    private static EndpointSource Open(string path, ValueLayout layout, string? key = "sample") => EndpointSource.Open(
        new EndpointSourceOptions { Path = path, Layout = layout, SampleColumn = key, OtherColumns = new HashSet<string> { "pair" } });

    private static List<(string Name, double[] Values)> Load(string path, ValueLayout layout)
    {
        using EndpointSource source = Open(path, layout);
        return Matrix.Load(source, Matrix.All(source, 10));
    }

    [Fact]
    public void All_number_types_and_truths_become_doubles_and_null_is_missing()
    {
        string path = Write("types.parquet",
            [
                new Column<string>("sample"), new Column<float>("float"), new Column<int>("int"), new Column<long?>("long"), new Column<short>("short"),
                new Column<sbyte>("sbyte"), new Column<byte>("byte"), new Column<ushort>("ushort"), new Column<uint?>("uint"), new Column<ulong>("ulong"),
                new Column<bool?>("truth"), new Column<bool>("sure"), new Column<decimal>("decimal", LogicalType.Decimal(18, 4)), new Column<double>("double"),
            ],
            g => MatrixFiles.Put(g, new[] { "a", "b" }), g => MatrixFiles.Put(g, new[] { 0.5f, float.NaN }), g => MatrixFiles.Put(g, new[] { -7, int.MaxValue }),
            g => MatrixFiles.Put(g, new long?[] { null, 1L << 52 }), g => MatrixFiles.Put(g, new short[] { -3, 3 }), g => MatrixFiles.Put(g, new sbyte[] { -128, 127 }),
            g => MatrixFiles.Put(g, new byte[] { 0, 255 }), g => MatrixFiles.Put(g, new ushort[] { 0, 65535 }), g => MatrixFiles.Put(g, new uint?[] { uint.MaxValue, null }),
            g => MatrixFiles.Put(g, new ulong[] { 0, 1UL << 40 }), g => MatrixFiles.Put(g, new bool?[] { true, null }), g => MatrixFiles.Put(g, new[] { false, true }),
            g => MatrixFiles.Put(g, new[] { 1.94m, -0.0001m }), g => MatrixFiles.Put(g, new[] { double.NaN, 1e-300 }));
        double[][] expected =
        [
            [0.5, double.NaN], [-7, int.MaxValue], [double.NaN, 1L << 52], [-3, 3], [-128, 127], [0, 255], [0, 65535], [uint.MaxValue, double.NaN],
            [0, 1UL << 40], [1, double.NaN], [0, 1], [1.94, -0.0001], [double.NaN, 1e-300],
        ];
        Assert.Equal(expected, Load(path, ValueLayout.SampleRows).Select(row => row.Values));
        var sheet = TextTable.Read(path, TextDialect.Usual);
        Assert.Equal<IEnumerable<string?>>(["0.5", null], sheet["float"]);
        Assert.Equal<IEnumerable<string?>>(["-7", "2147483647"], sheet["int"]);
        Assert.Equal<IEnumerable<string?>>(["true", null], sheet["truth"]);
        Assert.Equal<IEnumerable<string?>>(["1.94", "-0.0001"], sheet["decimal"]);
        Assert.Equal<IEnumerable<string?>>([null, "4503599627370496"], sheet["long"]);
        Assert.Equal<IEnumerable<string?>>([null, "1E-300"], sheet["double"]);
    }

    [Fact]
    public void Dates_of_a_sheet_are_written_as_dates()
    {
        string path = Write("dates.parquet", [new Column<Date>("day"), new Column<DateTime>("at"), new Column<string>("missing")],
            g => MatrixFiles.Put(g, new[] { new Date(2026, 3, 1) }), g => MatrixFiles.Put(g, new[] { new DateTime(2026, 3, 1, 7, 30, 0, DateTimeKind.Utc) }),
            g => MatrixFiles.Put(g, new[] { " NA " }));
        var sheet = TextTable.Read(path, TextDialect.Usual);
        Assert.Equal("2026-03-01", sheet["day"][0]);
        Assert.Equal("2026-03-01 07:30:00", sheet["at"][0]);
        Assert.Null(sheet["missing"][0]);
        Assert.Equal(["day", "at", "missing"], TextTable.ReadHeader(path, TextDialect.Usual));
    }

    [Fact]
    public void A_column_of_text_where_numbers_are_needed_is_refused_by_name_and_type()
    {
        string rows = Write("samples.parquet", [new Column<string>("sample"), new Column<string>("crp")],
            g => MatrixFiles.Put(g, new[] { "a" }), g => MatrixFiles.Put(g, new[] { "1.5" }));
        Refused.By(() => Load(rows, ValueLayout.SampleRows), "samples.parquet, column 'crp'", "the column holds text", "a column of numbers");
        string panel = Write("panel.parquet", [new Column<string>("marker"), new Column<Date>("s1"), new Column<double[]>("s2")],
            g => MatrixFiles.Put(g, new[] { "crp" }), g => MatrixFiles.Put(g, new[] { new Date(2026, 3, 1) }), g => MatrixFiles.Put(g, new[] { new[] { 1.0 } }));
        Refused.By(() => Load(panel, ValueLayout.EndpointRows), "panel.parquet, column 's1'", "the column holds dates", "a column of numbers");
        using EndpointSource source = Open(panel, ValueLayout.EndpointRows);
        Refused.By(() => source.Blocks(new EndpointSelection([1], _ => true, 1)), "panel.parquet, column 's2'", "the column holds a nested type", "a column of numbers");
        Refused.By(() => TextTable.Read(panel, TextDialect.Usual), "panel.parquet, column 's2'", "the column holds a nested type", "a column of text");
        Assert.Equal(1, TextTable.Read(panel, TextDialect.Usual, name => name == "s1").Rows);
    }

    [Fact]
    public void Infinite_values_are_refused_by_endpoint_and_sample()
    {
        string rows = Write("samples.parquet", [new Column<string>("sample"), new Column<double>("crp")],
            g => MatrixFiles.Put(g, new[] { "a", "b" }), g => MatrixFiles.Put(g, new[] { 1, double.NegativeInfinity }));
        Refused.By(() => Load(rows, ValueLayout.SampleRows), "samples.parquet, endpoint 'crp', sample 'b'", "the value is infinite", "a finite number or null");
        string panel = Write("panel.parquet", [new Column<string>("marker"), new Column<float>("s1")],
            g => MatrixFiles.Put(g, new[] { "crp", "il-6" }), g => MatrixFiles.Put(g, new[] { 1, float.PositiveInfinity }));
        Refused.By(() => Load(panel, ValueLayout.EndpointRows), "panel.parquet, endpoint 'il-6', sample 's1'", "the value is infinite", "a finite number or null");
    }

    [Fact]
    public void Names_are_required_and_distinct()
    {
        string twice = Write("samples.parquet", [new Column<string>("sample"), new Column<double>("crp")],
            g => MatrixFiles.Put(g, new[] { "a", "a" }), g => MatrixFiles.Put(g, new double[2]));
        Refused.By(() => Open(twice, ValueLayout.SampleRows), "samples.parquet, row 2",
            "sample 'a' stands in column 'sample' a second time, first in samples.parquet, row 1", "each sample once");
        string unnamed = Write("panel.parquet", [new Column<string>("marker"), new Column<double>("s1")],
            g => MatrixFiles.Put(g, new[] { "crp", null }), g => MatrixFiles.Put(g, new double[2]));
        Refused.By(() => Load(unnamed, ValueLayout.EndpointRows), "panel.parquet, row 2", "the endpoint has no name", "a name in column 'marker'");
        string column = Write("columns.parquet", [new Column<string>("sample"), new Column<double>("crp"), new Column<double>("crp ")],
            g => MatrixFiles.Put(g, new[] { "a" }), g => MatrixFiles.Put(g, new double[1]), g => MatrixFiles.Put(g, new double[1]));
        Refused.By(() => Open(column, ValueLayout.SampleRows), "columns.parquet", "column 'crp' stands twice (columns 2 and 3)", "each column name once");
        Refused.By(() => Open(twice, ValueLayout.SampleRows, "sampel"), "samples.parquet", "there is no column 'sampel'", "'sample', 'crp'");
    }

    [Fact]
    public void A_table_without_rows_or_columns_to_use_is_refused()
    {
        string none = Write("none.parquet", [new Column<string>("sample"), new Column<double>("crp")],
            g => MatrixFiles.Put(g, Array.Empty<string>()), g => MatrixFiles.Put(g, Array.Empty<double>()));
        foreach (ValueLayout layout in new[] { ValueLayout.SampleRows, ValueLayout.EndpointRows })
            Refused.By(() => Open(none, layout), "none.parquet", "the file holds columns and no row", "at least one row");
        Refused.By(() => TextTable.Read(none, TextDialect.Usual), "none.parquet", "the file holds columns and no row", "at least one row");
        string links = Write("links.parquet", [new Column<string>("sample"), new Column<string>("pair")],
            g => MatrixFiles.Put(g, new[] { "a" }), g => MatrixFiles.Put(g, new[] { "p" }));
        Refused.By(() => Open(links, ValueLayout.SampleRows), "links.parquet", "there is no endpoint column among 'sample', 'pair'", "one column for each endpoint");
        Refused.By(() => Open(links, ValueLayout.EndpointRows), "links.parquet", "there is no sample column beside 'sample'", "one column for each sample");
    }

    [Fact]
    public void A_key_of_whole_numbers_names_the_samples_by_their_text()
    {
        string path = Write("samples.parquet", [new Column<long>("sample"), new Column<double>("crp")],
            g => MatrixFiles.Put(g, new[] { 17L, 4L }), g => MatrixFiles.Put(g, new[] { 1.0, 2.0 }));
        using EndpointSource source = Open(path, ValueLayout.SampleRows);
        Assert.Equal(["17", "4"], source.Samples);
        using EndpointSource numbered = Open(path, ValueLayout.SampleRows, key: null);
        Assert.Equal(["1", "2"], numbered.Samples);
    }

    /// <summary>Every cut and many flipped bytes of a whole file: refused as damaged, or read; never another exception.</summary>
    [Fact]
    public void A_truncated_or_damaged_file_is_refused_and_never_crashes()
    {
        var matrix = new Matrix(endpoints: 40, samples: 12);
        byte[] whole = File.ReadAllBytes(MatrixFiles.EndpointRowsParquet(_folder, matrix, 15));
        var random = new Random(5);
        int refused = 0;
        for (int attempt = 0; attempt < 300; attempt++)
        {
            byte[] bytes = attempt < 100 ? whole[..(whole.Length * attempt / 100)] : [.. whole];
            if (attempt >= 100) bytes[random.Next(bytes.Length)] ^= (byte)(1 << random.Next(8));
            string path = _folder.Write("damaged.parquet", bytes);
            try
            {
                Load(path, ValueLayout.EndpointRows);
                Assert.True(attempt >= 100, "a truncated file was read");
            }
            catch (Exception failure)
            {
                var refusal = Assert.IsType<RefusalException>(failure);
                Assert.StartsWith(attempt == 0 ? path : "damaged.parquet", refusal.Where, StringComparison.Ordinal);
                if (attempt is > 0 and < 100) Assert.Equal("the file is damaged or not a Parquet file", refusal.Found);
                refused++;
            }
        }
        Assert.True(refused > 120, $"{refused} refused");
    }

    [Fact]
    public void A_text_file_with_the_ending_of_Parquet_is_refused()
    {
        string path = _folder.Write("panel.parquet", "marker,a\ncrp,1\n");
        Refused.By(() => Open(path, ValueLayout.EndpointRows), "panel.parquet", "the file is damaged or not a Parquet file", "a complete Parquet file");
        Refused.By(() => TextTable.ReadHeader(path, TextDialect.Usual), "panel.parquet", "the file is damaged or not a Parquet file", "a complete Parquet file");
        Refused.By(() => TextTable.ReadHeader(_folder.File("x.parquet"), TextDialect.Usual), _folder.File("x.parquet"), "there is no such file", "a file to read");
    }
}
