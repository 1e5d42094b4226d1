using System.Globalization;
using CsCheck;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Tests.Text;

public class CellNumbersTests
{
    private static readonly CellNumbers Point = new(TextDialect.Usual);
    private static readonly CellNumbers Comma = new(TextDialect.Usual with { DecimalMark = ',' });

    [Theory]
    [InlineData("1.5", 1.5)]
    [InlineData("-1.5e3", -1500)]
    [InlineData("+2", 2)]
    [InlineData(".5", 0.5)]
    [InlineData("5.", 5)]
    [InlineData("1E-3", 0.001)]
    [InlineData("1e-400", 0)]
    [InlineData("9007199254740993", 9007199254740992)]
    [InlineData("-0", -0.0)]
    public void Decimal_numbers_are_read(string cell, double value)
    {
        Assert.True(Point.TryRead(cell, out double read));
        Assert.Equal(BitConverter.DoubleToInt64Bits(value), BitConverter.DoubleToInt64Bits(read));
    }

    [Fact]
    public void A_decimal_comma_is_read_where_it_is_the_mark()
    {
        Assert.True(Comma.TryRead("-1,25", out double read));
        Assert.Equal(-1.25, read);
    }

    [Theory]
    [InlineData("n.d.")]
    [InlineData("1abc")]
    [InlineData("0x10")]
    [InlineData("1_0")]
    [InlineData("1e")]
    [InlineData("1 5")]
    [InlineData("1,5")]
    [InlineData("1,000.5")]
    [InlineData("<0.5")]
    [InlineData("-")]
    [InlineData("+")]
    [InlineData("+-1")]
    [InlineData("\u22121")]
    [InlineData("nan")]
    [InlineData("-nan")]
    [InlineData("na")]
    [InlineData("1.2.3")]
    [InlineData("1%")]
    [InlineData("(1)")]
    [InlineData("\u0661")]
    public void What_is_no_number_is_refused(string cell)
    {
        Assert.False(Point.TryRead(cell, out _));
        Assert.Equal($"'{cell}' is not a number", Point.Refusal("here", cell).Found);
    }

    [Theory]
    [InlineData("inf", "'inf' is infinite")]
    [InlineData("-Infinity", "'-Infinity' is infinite")]
    [InlineData("1e400", "'1e400' is larger than a double can hold (1.8e308)")]
    [InlineData("-1e400", "'-1e400' is larger than a double can hold (1.8e308)")]
    public void Infinite_values_are_refused(string cell, string found)
    {
        Assert.False(Point.TryRead(cell, out _));
        Assert.Equal(found, Point.Refusal("here", cell).Found);
    }

    [Fact]
    public void The_other_decimal_mark_is_suspected_where_it_would_explain_the_cell()
    {
        Assert.Contains("set data.decimal: \",\"", Point.Refusal("here", "1,5").Remedy, StringComparison.Ordinal);
        var refusal = Comma.Refusal("here", "1.5");
        Assert.Contains("set data.decimal: \".\"", refusal.Remedy, StringComparison.Ordinal);
        Assert.Equal("a decimal number with decimal comma or a missing mark ('', 'NA', 'NaN', '.')", refusal.Expected);
    }

    [Theory]
    [InlineData("")]
    [InlineData("NA")]
    [InlineData("NaN")]
    [InlineData(".")]
    public void Missing_tokens_are_not_a_number(string cell)
    {
        Assert.True(Point.TryRead(cell, out double read));
        Assert.True(double.IsNaN(read));
    }

    [Fact]
    public void A_token_that_is_a_number_is_missing_all_the_same_and_an_empty_cell_needs_its_token()
    {
        var numbers = new CellNumbers(TextDialect.Usual with { Missing = ["-9", "Ø"] });
        Assert.True(numbers.TryRead("-9", out double read) && double.IsNaN(read));
        Assert.True(numbers.TryRead("Ø", out read) && double.IsNaN(read));
        Assert.True(numbers.TryRead("-9.0", out read) && read == -9);
        Assert.False(numbers.TryRead("", out _));
        Assert.Equal("'' is not a number", numbers.Refusal("here", "").Found);
    }

    [Fact]
    public void A_long_cell_is_shown_by_its_beginning() =>
        Assert.Equal($"'{new string('x', 37)}...' is not a number", Point.Refusal("here", new string('x', 100)).Found);

    [Fact]
    public void Any_double_survives_its_shortest_text() =>
        Gen.Double.Where(double.IsFinite).Sample(value =>
        {
            Assert.True(Point.TryRead(value.ToString("R", CultureInfo.InvariantCulture), out double read));
            return BitConverter.DoubleToInt64Bits(value) == BitConverter.DoubleToInt64Bits(read);
        });
}
