using System.Text;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Storage.Tests.Values;

public sealed class DelimitedEndpointRowsTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private EndpointSource Open(string text, string? column = null, IReadOnlySet<string>? others = null) => EndpointSource.Open(new EndpointSourceOptions
    {
        Path = _folder.Write("panel.csv", text),
        Layout = ValueLayout.EndpointRows,
        EndpointColumn = column,
        OtherColumns = others ?? new HashSet<string>(),
    });

    private List<(string Name, double[] Values)> Load(string text, int perBlock = 100, int threads = 1)
    {
        using EndpointSource source = Open(text);
        return Matrix.Load(source, Matrix.All(source, perBlock), threads);
    }

    [Fact]
    public void The_endpoint_column_may_stand_anywhere_and_other_columns_may_hold_text()
    {
        using EndpointSource source = Open("unit,a,marker,b\nmg/l,1,crp,2\npg/ml,3,il-6,NA\n", "marker", new HashSet<string> { "unit" });
        Assert.Equal(["a", "b"], source.Samples);
        var loaded = Matrix.Load(source, Matrix.All(source, 10));
        Assert.Equal(["crp", "il-6"], loaded.Select(row => row.Name));
        Assert.Equal([1, 2], loaded[0].Values);
        Assert.Equal([3, double.NaN], loaded[1].Values);
    }

    [Fact]
    public void Columns_that_are_not_wanted_are_never_parsed()
    {
        using EndpointSource source = Open("marker,a,note,b\ncrp,1,high?,2\nremark,x,y,z\n");
        var loaded = Matrix.Load(source, new EndpointSelection([2, 0], name => name == "crp", 10));
        Assert.Equal([2, 1], Assert.Single(loaded).Values);
    }

    [Fact]
    public void An_unnamed_first_column_holds_the_endpoints() =>
        Assert.Equal("crp", Load("\"\",a,b\n\"crp\",1,2\n")[0].Name);

    [Theory]
    [InlineData("n.d.", "'n.d.' is not a number")]
    [InlineData("Infinity", "'Infinity' is infinite")]
    [InlineData("1e400", "'1e400' is larger than a double can hold (1.8e308)")]
    public void A_cell_that_is_no_finite_number_is_refused_with_line_endpoint_and_sample(string cell, string found) =>
        Refused.By(() => Load($"marker,s01,s02\ncrp,1,2\nferritin,3,{cell}\n"), "panel.csv, line 3, endpoint 'ferritin', sample 's02'", found,
            "a decimal number or a missing mark ('', 'NA', 'NaN', '.')");

    [Fact]
    public void The_line_is_right_in_late_blocks_and_after_quoted_line_ends()
    {
        var text = new StringBuilder("marker,s01,s02\n");
        for (int i = 0; i < 500; i++) text.Append("\"m\n").Append(i).Append("\",1,").Append(i == 451 ? "x" : "2").Append('\n');
        foreach (int perBlock in new[] { 1, 7, 1000 })
            Refused.By(() => Load(text.ToString(), perBlock), "panel.csv, line 904, endpoint 'm\n451', sample 's02'", "'x' is not a number", "a decimal number");
    }

    [Theory]
    [InlineData("marker,a,b\ncrp,1\n", "panel.csv, line 2", "the line has 2 cells")]
    [InlineData("marker,a,b\ncrp,1,2\nil-6,1,2,3\n", "panel.csv, line 3", "the line has 4 cells")]
    [InlineData("marker,a,b\ncrp,1,2\n\nil-6,1,2\n", "panel.csv, line 3", "the line is blank or has one cell")]
    public void A_ragged_line_is_refused(string text, string where, string found)
    {
        Refused.By(() => Load(text), where, found, "3 cells, one for each column of the header");
        Refused.By(() => Load(text, perBlock: 1), where, found, "3 cells, one for each column of the header");
    }

    [Fact]
    public void A_header_that_lacks_the_first_name_is_guessed_as_the_cause()
    {
        var refusal = Refused.By(() => Load("a,b\ncrp,1,2\n"), "panel.csv, line 2", "the line has 3 cells", "2 cells");
        Assert.Contains("the header lacks a name for the first column", refusal.Remedy, StringComparison.Ordinal);
    }

    [Fact]
    public void Blank_lines_at_the_end_are_ignored_even_when_blocks_are_small() =>
        Assert.Equal(2, Load("marker,a\ncrp,1\nil-6,2\n\n \r\n\n", perBlock: 1).Count);

    [Fact]
    public void An_endpoint_without_a_name_is_refused() =>
        Refused.By(() => Load("marker,a\ncrp,1\n ,2\n"), "panel.csv, line 3", "the endpoint has no name", "a name");

    [Fact]
    public void A_duplicate_sample_column_is_refused() =>
        Refused.By(() => Open("marker,s01,s02,s01\ncrp,1,2,3\n"), "panel.csv", "column 's01' stands twice (columns 2 and 4)", "each column name once");

    [Fact]
    public void A_sample_column_without_a_name_is_refused() =>
        Refused.By(() => Open("marker,s01,\ncrp,1,\n"), "panel.csv", "column 3 has no name", "a sample name");

    [Fact]
    public void An_endpoint_column_that_is_not_there_is_refused()
    {
        var refusal = Refused.By(() => Open("marker,a\ncrp,1\n", "Markers"), "panel.csv", "there is no column 'Markers'", "'marker', 'a'");
        Assert.Equal("Did you mean 'marker'?", refusal.Remedy);
    }

    [Fact]
    public void A_file_without_sample_columns_is_refused() =>
        Refused.By(() => Open("marker\ncrp\n"), "panel.csv", "there is no sample column beside 'marker'", "one column for each sample");

    [Fact]
    public void A_header_only_is_refused() =>
        Refused.By(() => Open("marker,a,b\n\n"), "panel.csv", "the file holds a header and no row", "at least one row");

    [Fact]
    public void Text_that_is_not_UTF_8_is_refused_with_its_line()
    {
        string path = _folder.Write("panel.csv", Encoding.Latin1.GetBytes("marker,a\ncrp,1\nµ-opioid,2\n"));
        using EndpointSource source = EndpointSource.Open(new EndpointSourceOptions { Path = path, Layout = ValueLayout.EndpointRows });
        Refused.By(() => Matrix.Load(source, Matrix.All(source, 10)), "panel.csv, line 3", "the byte 0xB5 is not UTF-8", "UTF-8");
    }

    [Fact]
    public void A_block_can_be_loaded_once()
    {
        using EndpointSource source = Open("marker,a\ncrp,1\n");
        PendingBlock block = Assert.Single(source.Blocks(Matrix.All(source, 10)));
        block.Load(new EndpointBlock());
        Assert.Throws<InvalidOperationException>(() => block.Load(new EndpointBlock()));
    }

    [Fact]
    public void Blocks_are_bounded_by_rows_and_by_bytes_and_reach_the_end()
    {
        var text = new StringBuilder("marker,a\n");
        for (int i = 0; i < 100_000; i++) text.Append("marker").Append(i).Append(",0.125000000000000\n");
        using EndpointSource source = Open(text.ToString());
        var few = source.Blocks(Matrix.All(source, 30_000)).ToList();
        Assert.True(few.Count > 4);
        Assert.Equal(1, few[^1].Reached);
        Assert.Equal(few.Select(block => block.Reached).Order(), few.Select(block => block.Reached));
        Assert.Equal(100, source.Blocks(Matrix.All(source, 1000)).Count());
    }
}
