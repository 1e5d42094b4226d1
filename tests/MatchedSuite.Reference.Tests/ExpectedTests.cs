namespace MatchedSuite.Reference.Tests;

public class ExpectedTests
{
    [Fact]
    public void All_reference_entries_are_read_with_their_tolerances()
    {
        Assert.Equal(2818, ReferenceTable.Read("expected.csv").Rows);
        Assert.Equal(3.9, Expected.Value("evalues", "evalue_rr3.9", "rr"));
        Assert.Equal(1e-12, Expected.Tolerance("evalues", "evalue_rr3.9", "rr"));
    }

    [Fact]
    public void A_number_outside_its_tolerance_fails_the_check()
    {
        Expected.Check(3.9, "evalues", "evalue_rr3.9", "rr");
        Assert.ThrowsAny<Exception>(() => Expected.Check(3.9000001, "evalues", "evalue_rr3.9", "rr"));
        Assert.ThrowsAny<Exception>(() => Expected.Check(double.NaN, "evalues", "evalue_rr3.9", "rr"));
    }

    [Fact]
    public void A_data_set_comes_as_columns()
    {
        var table = Expected.Table("twins_hippocampus");
        Assert.Equal(15, table.Rows);
        Assert.All(table.Numbers(table.Columns[^1]), value => Assert.True(double.IsFinite(value)));
    }
}
