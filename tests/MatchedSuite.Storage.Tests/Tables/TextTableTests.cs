using System.Text;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Storage.Tests.Tables;

public sealed class TextTableTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    private TextTable Read(string text, TextDialect? dialect = null) =>
        TextTable.Read(_folder.Write("samples.csv", text), dialect ?? TextDialect.Usual);

    [Theory]
    [InlineData("id,age,sex\na,31,f\nb,44,m\n")]
    [InlineData("id;age;sex\na;31;f\nb;44;m\n")]
    [InlineData("id\tage\tsex\na\t31\tf\nb\t44\tm\n")]
    [InlineData("id|age|sex\na|31|f\nb|44|m\n")]
    [InlineData("id,age,sex\r\na,31,f\r\nb,44,m\r\n")]
    [InlineData("id,age,sex\ra,31,f\rb,44,m\r")]
    [InlineData("id,age,sex\na,31,f\nb,44,m")]
    [InlineData("id,age,sex\na,31,f\nb,44,m\n\n\r\n  \n")]
    [InlineData(" id , age,sex\n a ,31 , f\nb, 44,m \n")]
    [InlineData("\"id\",\"age\",\"sex\"\n\"a\",\"31\",\"f\"\n\"b\",\"44\",\"m\"\n")]
    public void Every_dialect_gives_the_same_table(string text)
    {
        var table = Read(text);
        Assert.Equal<IEnumerable<string?>>(["id", "age", "sex"], table.Columns);
        Assert.Equal(2, table.Rows);
        Assert.Equal<IEnumerable<string?>>(["a", "b"], table["id"]);
        Assert.Equal<IEnumerable<string?>>(["31", "44"], table["age"]);
        Assert.Equal<IEnumerable<string?>>(["f", "m"], table["sex"]);
        Assert.Equal("samples.csv, line 2", table.Place(0));
        Assert.Equal("samples.csv, line 3", table.Place(1));
    }

    public static TheoryData<string, byte[]> Encodings => new()
    {
        { "UTF-8 with mark", [.. Encoding.UTF8.Preamble, .. Encoding.UTF8.GetBytes("id,ort\na,Köln\n")] },
        { "UTF-16 little end first", [.. Encoding.Unicode.Preamble, .. Encoding.Unicode.GetBytes("id,ort\na,Köln\n")] },
        { "UTF-16 big end first", [.. Encoding.BigEndianUnicode.Preamble, .. Encoding.BigEndianUnicode.GetBytes("id,ort\na,Köln\n")] },
        { "UTF-8 without mark", Encoding.UTF8.GetBytes("id,ort\na,Köln\n") },
    };

    [Theory]
    [MemberData(nameof(Encodings))]
    public void A_byte_order_mark_is_heeded_and_no_part_of_the_first_name(string encoding, byte[] bytes)
    {
        var table = TextTable.Read(_folder.Write("samples.csv", bytes), TextDialect.Usual);
        Assert.True(table.Contains("id"), encoding);
        Assert.Equal("Köln", table["ort"][0]);
    }

    [Fact]
    public void Quoted_cells_may_hold_delimiters_quotes_and_line_ends_and_lines_are_counted_through_them()
    {
        var table = Read("id,note\na,\"one, two\"\nb,\"said \"\"no\"\"\"\nc,\"first\nsecond\"\nd,plain\n");
        Assert.Equal<IEnumerable<string?>>(["one, two", "said \"no\"", "first\nsecond", "plain"], table["note"]);
        Assert.Equal("samples.csv, line 4", table.Place(2));
        Assert.Equal("samples.csv, line 6", table.Place(3));
    }

    [Fact]
    public void A_delimiter_inside_quotes_of_the_header_does_not_mislead_the_search()
    {
        var table = Read("\"weight, kg, dry\";id\n1,5;a\n");
        Assert.Equal<IEnumerable<string?>>(["weight, kg, dry", "id"], table.Columns);
        Assert.Equal("1,5", table["weight, kg, dry"][0]);
    }

    [Fact]
    public void A_number_sign_in_a_header_name_is_an_ordinary_character()
    {
        var table = Read("#id,batch #2\na,x\n#b,y\n");
        Assert.Equal<IEnumerable<string?>>(["#id", "batch #2"], table.Columns);
        Assert.Equal<IEnumerable<string?>>(["a", "#b"], table["#id"]);
    }

    [Fact]
    public void Missing_tokens_are_null_and_others_are_text()
    {
        var table = Read("id,x\na,NA\nb,\nc, . \nd,na\ne,NaN\n");
        Assert.Equal<IEnumerable<string?>>([null, null, null, "na", null], table["x"]);
        var own = Read("id,x\na,NA\nb,-9\nc,\n", TextDialect.Usual with { Missing = ["-9"] });
        Assert.Equal<IEnumerable<string?>>(["NA", null, ""], own["x"]);
    }

    [Fact]
    public void Only_wanted_columns_are_kept()
    {
        var table = TextTable.Read(_folder.Write("wide.csv", "id,m1,m2,sex\na,1,2,f\n"), TextDialect.Usual, name => name[0] != 'm');
        Assert.Equal<IEnumerable<string?>>(["id", "sex"], table.Columns);
        Assert.False(table.Contains("m1"));
    }

    [Fact]
    public void A_column_without_a_name_is_left_out()
    {
        var table = Read("\"\",id,sex\n1,a,f\n2,b,m\n");
        Assert.Equal<IEnumerable<string?>>(["id", "sex"], table.Columns);
        Assert.Equal<IEnumerable<string?>>(["a", "b"], table["id"]);
    }

    [Fact]
    public void A_single_column_needs_no_delimiter() => Assert.Equal<IEnumerable<string?>>(["a", null, "b"], Read("id\na\n\nb\n\n")["id"]);

    [Fact]
    public void The_header_alone_can_be_read() =>
        Assert.Equal<IEnumerable<string?>>(["id", "x"], TextTable.ReadHeader(_folder.Write("h.csv", "id;x\n"), TextDialect.Usual));

    [Fact]
    public void A_column_that_is_not_there_is_refused_with_those_that_are()
    {
        var table = Read("sample_id,age\na,31\n");
        var refusal = Refused.By(() => _ = table["smaple_id"], "samples.csv", "there is no column 'smaple_id'", "'sample_id', 'age'");
        Assert.Equal("Did you mean 'sample_id'?", refusal.Remedy);
    }

    [Fact]
    public void A_duplicate_column_is_refused() =>
        Refused.By(() => Read("id,x,y, x\na,1,2,3\n"), "samples.csv", "column 'x' stands twice (columns 2 and 4)", "each column name once");

    [Theory]
    [InlineData("id,x\na,1\nb,2,3\n", "samples.csv, line 3", "the line has 3 cells")]
    [InlineData("id,x\na,1\n\nb,2\n", "samples.csv, line 3", "the line is blank or has one cell")]
    [InlineData("id,x,y\n\"a\nb\",1,2\nc,1\n", "samples.csv, line 4", "the line has 2 cells")]
    public void A_ragged_row_is_refused_with_its_line(string text, string where, string found) =>
        Refused.By(() => Read(text), where, found, "one for each column of the header");

    [Theory]
    [InlineData("id,x\n")]
    [InlineData("id,x")]
    [InlineData("id,x\n\n\r\n ")]
    public void A_header_without_rows_is_refused(string text) =>
        Refused.By(() => Read(text), "samples.csv", "the file holds a header and no row", "at least one row");

    [Fact]
    public void An_empty_file_is_refused() => Refused.By(() => Read(""), _folder.File("samples.csv"), "the file is empty", "a header");

    [Fact]
    public void Blank_lines_alone_are_refused() =>
        Refused.By(() => Read("\n\n"), "samples.csv", "the file holds blank lines only", "a header");

    [Fact]
    public void A_blank_line_above_the_header_is_refused() =>
        Refused.By(() => Read("\nid,x\na,1\n"), "samples.csv, line 1", "the line is blank", "the header");

    [Fact]
    public void A_missing_file_is_refused_with_the_nearest_name()
    {
        _folder.Write("samples.csv", "id\na\n");
        var refusal = Refused.By(() => TextTable.Read(_folder.File("sample.csv"), TextDialect.Usual), _folder.File("sample.csv"),
            "there is no such file", "a file to read");
        Assert.Equal("Did you mean 'samples.csv'?", refusal.Remedy);
    }

    [Fact]
    public void A_folder_instead_of_a_file_is_refused() =>
        Refused.By(() => TextTable.Read(_folder.Path, TextDialect.Usual), _folder.Path, "this is a folder", "a file");

    [Theory]
    [InlineData("id,x\na,1\nb,\"open\nc,3\n", "samples.csv, line 3")]
    [InlineData("\"id,x\na,1\n", "samples.csv, line 1")]
    public void An_unterminated_quote_is_refused_where_its_record_begins(string text, string where) =>
        Refused.By(() => Read(text), where, "a quote is opened in this record and never closed", "an even number of quotes");

    [Fact]
    public void Latin_1_is_refused_with_the_line_of_the_first_foreign_byte()
    {
        string path = _folder.Write("samples.csv", Encoding.Latin1.GetBytes("id,ort\na,Ulm\nb,Köln\nc,Düren\n"));
        var refusal = Refused.By(() => TextTable.Read(path, TextDialect.Usual), "samples.csv, line 3", "the byte 0xF6 is not UTF-8", "UTF-8");
        Assert.Contains("Save the file as UTF-8", refusal.Remedy, StringComparison.Ordinal);
    }

    [Fact]
    public void UTF_16_without_its_mark_is_refused()
    {
        string path = _folder.Write("samples.csv", Encoding.Unicode.GetBytes("id,x\na,1\n"));
        Refused.By(() => TextTable.Read(path, TextDialect.Usual), "samples.csv, line 1",
            "the text holds a NUL character, so it is UTF-16 without its mark, or not text", "UTF-16 that begins with a byte order mark");
    }

    [Fact]
    public void Broken_UTF_16_is_refused()
    {
        byte[] bytes = [.. Encoding.Unicode.Preamble, .. Encoding.Unicode.GetBytes("id,x\na,"), 0x00, 0xD8, .. Encoding.Unicode.GetBytes("b\n")];
        Refused.By(() => TextTable.Read(_folder.Write("samples.csv", bytes), TextDialect.Usual), "samples.csv, line 1",
            "the text is not valid UTF-16 here or some lines further down", "UTF-16");
    }

    [Theory]
    [InlineData("PAR1", "this is a Parquet file")]
    [InlineData("\u001f\u008b\u0008\u0000", "this is compressed with gzip")]
    [InlineData("PK\u0003\u0004", "this is a workbook or a zip archive")]
    public void A_file_of_another_kind_is_named(string start, string found) =>
        Refused.By(() => TextTable.Read(_folder.Write("samples.csv", Encoding.Latin1.GetBytes(start + "....")), TextDialect.Usual),
            "samples.csv", found, "delimited text");

    [Fact]
    public void Mixed_line_ends_are_refused() =>
        Refused.By(() => Read("id,x\na,1\rb,2\nc,3\n"), "samples.csv, line 2",
            "some lines here or further down end by a carriage return alone, others do not", "one kind of line end");

    [Theory]
    [InlineData(',', ',', "',' is asked for as delimiter and as decimal mark")]
    [InlineData('a', '.', "'a' is asked for as delimiter")]
    public void An_impossible_delimiter_is_refused(char delimiter, char decimalMark, string found) =>
        Refused.By(() => Read("id,x\na,1\n", new TextDialect { Delimiter = delimiter, DecimalMark = decimalMark }),
            "samples.csv", found, "a delimiter among");

    [Fact]
    public void A_delimiter_that_is_asked_for_wins_over_the_search()
    {
        var table = Read("id;a,b,c\nx;1,2,3\n", new TextDialect { Delimiter = ';' });
        Assert.Equal<IEnumerable<string?>>(["id", "a,b,c"], table.Columns);
    }

    [Fact]
    public void A_table_of_several_chunks_keeps_its_lines()
    {
        var text = new StringBuilder("id,note\n");
        for (int row = 0; row < 30_000; row++) text.Append("sample").Append(row).Append(",\"").Append('x', 60).Append('\n').Append(row % 7).Append("\"\n");
        var table = Read(text.ToString());
        Assert.Equal(30_000, table.Rows);
        Assert.Equal("sample29999", table["id"][29_999]);
        Assert.Equal("samples.csv, line 60000", table.Place(29_999));
    }
}
