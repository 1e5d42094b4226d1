using System.Globalization;
using System.Text;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Storage.Tests.Values;

public sealed class DelimitedSampleRowsTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private EndpointSource Open(string text, string? key = "sample", IReadOnlySet<string>? others = null, int threads = 2, long memory = 1 << 29) =>
        EndpointSource.Open(new EndpointSourceOptions
        {
            Path = _folder.Write("samples.csv", text),
            Layout = ValueLayout.SampleRows,
            SampleColumn = key,
            OtherColumns = others ?? new HashSet<string>(),
            Threads = threads,
            Memory = memory,
            ScratchFolder = _folder.File("scratch"),
        });

    private List<(string Name, double[] Values)> Load(string text, int threads = 2)
    {
        using EndpointSource source = Open(text, threads: threads);
        return Matrix.Load(source, Matrix.All(source, 100));
    }

    [Fact]
    public void Links_are_no_endpoints_and_may_hold_text()
    {
        using EndpointSource source = Open("sample,pair,crp,sex\ns1,p1,1.5,f\ns2,p1,NA,m\n", others: new HashSet<string> { "pair", "sex" });
        Assert.Equal(["s1", "s2"], source.Samples);
        var row = Assert.Single(Matrix.Load(source, Matrix.All(source, 10)));
        Assert.Equal("crp", row.Name);
        Assert.Equal([1.5, double.NaN], row.Values);
    }

    [Fact]
    public void Rows_without_a_key_are_called_by_their_number()
    {
        using EndpointSource source = Open("crp,il-6\n1,2\n3,4\n5,6\n", key: null);
        Assert.Equal(["1", "2", "3"], source.Samples);
        Assert.Equal([6, 2], Matrix.Load(source, new EndpointSelection([2, 0], name => name == "il-6", 1))[0].Values);
    }

    [Fact]
    public void A_duplicate_sample_is_refused_with_both_lines() =>
        Refused.By(() => Open("sample,crp\na,1\nb,2\na,3\n"), "samples.csv, line 4",
            "sample 'a' stands in column 'sample' a second time, first in samples.csv, line 2", "each sample once");

    [Theory]
    [InlineData("")]
    [InlineData("NA")]
    public void A_sample_without_a_name_is_refused(string name) =>
        Refused.By(() => Open($"sample,crp\na,1\n{name},2\n"), "samples.csv, line 3", "the sample has no name in column 'sample'", "a name for each sample");

    [Fact]
    public void A_key_column_that_is_not_there_is_refused_with_those_that_are()
    {
        var refusal = Refused.By(() => Open("sample_id,crp\na,1\n", key: "sampleid"), "samples.csv", "there is no column 'sampleid'", "'sample_id', 'crp'");
        Assert.Equal("Did you mean 'sample_id'?", refusal.Remedy);
    }

    [Fact]
    public void A_long_list_of_columns_is_shortened()
    {
        string header = string.Join(',', Enumerable.Range(0, 1000).Select(i => $"m{i}"));
        var refusal = Assert.Throws<RefusalException>(() => Open($"{header}\n{header}\n"));
        Assert.EndsWith("'m11' and 988 more", refusal.Expected, StringComparison.Ordinal);
    }

    [Fact]
    public void A_duplicate_endpoint_column_is_refused() =>
        Refused.By(() => Open("sample,crp,crp\na,1,2\n"), "samples.csv", "column 'crp' stands twice (columns 2 and 3)", "each column name once");

    [Fact]
    public void An_endpoint_column_without_a_name_is_refused() =>
        Refused.By(() => Open("sample,crp,\na,1,\n"), "samples.csv", "column 3 has no name", "an endpoint name");

    [Fact]
    public void A_file_without_endpoints_is_refused() =>
        Refused.By(() => Open("sample,pair\na,p\n", others: new HashSet<string> { "pair" }), "samples.csv",
            "there is no endpoint column among 'sample', 'pair'", "one column for each endpoint");

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void A_header_only_is_refused(bool named) =>
        Refused.By(() => Open("sample,crp\n", named ? "sample" : null), "samples.csv", "the file holds a header and no row", "at least one row");

    [Theory]
    [InlineData("n.d.", "'n.d.' is not a number")]
    [InlineData("-inf", "'-inf' is infinite")]
    [InlineData("1e999", "'1e999' is larger than a double can hold (1.8e308)")]
    public void A_cell_that_is_no_finite_number_is_refused_with_line_endpoint_and_sample(string cell, string found) =>
        Refused.By(() => Load($"sample,crp,il-6\na,1,2\nb,3,{cell}\n"), "samples.csv, line 3, endpoint 'il-6', sample 'b'", found, "a decimal number");

    [Fact]
    public void A_ragged_line_is_refused() =>
        Refused.By(() => Load("sample,crp\na,1\nb,2,3\n"), "samples.csv, line 3", "the line has 3 cells", "2 cells, one for each column of the header");

    [Fact]
    public void The_first_of_several_refusals_is_told_whatever_the_threads()
    {
        var text = new StringBuilder("sample,m1,m2\n");
        for (int row = 0; row < 300_000; row++)
            text.Append(CultureInfo.InvariantCulture, $"s{row},{(row % 50_000 == 49_999 ? "bad" : "0.25")},1\n");
        for (int attempt = 0; attempt < 5; attempt++)
            foreach (int threads in new[] { 1, 4 })
                Refused.By(() => Load(text.ToString(), threads), "samples.csv, line 50001, endpoint 'm1', sample 's49999'", "'bad' is not a number", "a decimal number");
    }

    [Theory]
    [InlineData("sample,crp\na,1\n")]
    [InlineData("sample,crp\na,1\nb,2\nc,3\n")]
    public void A_file_that_changes_between_its_two_readings_is_refused(string later)
    {
        using EndpointSource source = Open("sample,crp\na,1\nb,2\n");
        _folder.Write("samples.csv", later);
        Refused.By(() => _ = source.Blocks(Matrix.All(source, 10)).ToList(), "samples.csv", "the file has changed while it was read", "a file that stays as it is");
    }

    /// <summary>Beyond 4 million characters a record is parsed in pieces; quoted names and cells lie across the cuts.</summary>
    [Theory]
    [InlineData(1 << 29)]
    [InlineData(1 << 22)]
    public void Records_of_many_million_characters_are_read_in_pieces(long memory)
    {
        const int endpoints = 450_000;
        var text = new StringBuilder("sample,pair");
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
            text.Append(endpoint % 1000 == 0 ? $",\"endpoint, {endpoint}\"" : $",endpoint {endpoint}");
        text.Append('\n');
        for (int sample = 0; sample < 3; sample++)
        {
            text.Append(CultureInfo.InvariantCulture, $"s{sample},p");
            for (int endpoint = 0; endpoint < endpoints; endpoint++)
                text.Append(CultureInfo.InvariantCulture, $",{(endpoint % 777 == 0 ? "\" \"" : (endpoint + sample / 4.0).ToString("F4", CultureInfo.InvariantCulture))}");
            text.Append('\n');
        }
        using EndpointSource source = Open(text.ToString(), others: new HashSet<string> { "pair" }, memory: memory);
        var loaded = Matrix.Load(source, new EndpointSelection([2, 0], _ => true, 5000), threads: 2);
        Assert.Equal(endpoints, loaded.Count);
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
        {
            Assert.Equal(endpoint % 1000 == 0 ? $"endpoint, {endpoint}" : $"endpoint {endpoint}", loaded[endpoint].Name);
            bool missing = endpoint % 777 == 0;
            Assert.Equal(missing ? double.NaN : endpoint + 0.5, loaded[endpoint].Values[0]);
            Assert.Equal(missing ? double.NaN : endpoint, loaded[endpoint].Values[1]);
        }
    }

    [Fact]
    public void A_refusal_in_a_late_piece_names_the_endpoint_and_a_cell_beyond_a_piece_is_refused()
    {
        const int endpoints = 400_000;
        string header = "sample," + string.Join(',', Enumerable.Range(0, endpoints).Select(endpoint => $"endpoint {endpoint}")) + "\n";
        string values = string.Join(',', Enumerable.Repeat("0.123456789012", endpoints - 1));
        Refused.By(() => Load($"{header}a,{values},1\nb,{values},high\n"), "samples.csv, line 3, endpoint 'endpoint 399999', sample 'b'",
            "'high' is not a number", "a decimal number");
        Refused.By(() => Load($"{header}a,{values}\n"), "samples.csv, line 2", "the line has 400000 cells", "400001 cells");
        Refused.By(() => Load($"{header}a,{values},{new string('1', 300_000)}\n"), "samples.csv, line 2", "a cell is longer than 262144 characters", "shorter cells");
        Assert.Equal([double.NaN], Load($"{header}a,{values},")[^1].Values);
    }

    [Fact]
    public void The_scratch_file_keeps_no_name_while_it_is_used_and_a_folder_that_cannot_hold_it_is_told()
    {
        using EndpointSource source = Open("sample,a,b\ns,1,2\nt,3,4\n", memory: 8);
        var blocks = source.Blocks(Matrix.All(source, 1)).ToList();
        Assert.Equal(2, blocks.Count);
        string scratch = _folder.File("scratch");
        Assert.True(Directory.Exists(scratch));
        if (!OperatingSystem.IsWindows()) Assert.Empty(Directory.GetFileSystemEntries(scratch));

        string file = _folder.Write("no-folder", "x");
        using EndpointSource other = EndpointSource.Open(new EndpointSourceOptions
        {
            Path = _folder.File("samples.csv"), Layout = ValueLayout.SampleRows, SampleColumn = "sample", Memory = 8, ScratchFolder = file,
        });
        var failure = Assert.Throws<IOException>(() => other.Blocks(Matrix.All(other, 1)).ToList());
        Assert.StartsWith($"A scratch file of 32 bytes cannot be made in '{file}':", failure.Message, StringComparison.Ordinal);
    }
}
