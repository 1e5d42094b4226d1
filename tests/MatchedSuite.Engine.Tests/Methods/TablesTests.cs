using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Output;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Tests.Methods;

public class TablesTests
{
    [Fact]
    public void Every_method_and_adjustment_of_this_version_is_a_known_name()
    {
        Assert.All(PairMethodTable.All, method => Assert.Contains(method.Name, KnownNames.Methods));
        Assert.All(AdjustmentTable.All, adjustment => Assert.Contains(adjustment.Name, KnownNames.Adjustments));
    }

    [Fact]
    public void The_methods_for_subjects_are_known_names_for_the_kinds_they_say()
    {
        foreach (EndpointKind kind in Enum.GetValues<EndpointKind>())
        {
            Assert.Equal(KnownNames.MethodsFor(DesignKind.Visits, kind).Order(), VisitMethodTable.NamesFor(kind).Order());
            Assert.Equal(KnownNames.MethodsFor(DesignKind.ChangeByArm, kind).Order(), ArmMethodTable.NamesFor(kind).Order());
            Assert.Equal(KnownNames.MethodsFor(DesignKind.Crossover, kind).Order(), CrossoverMethodTable.NamesFor(kind).Order());
        }
    }

    [Fact]
    public void No_name_stands_twice()
    {
        Assert.Equal(PairMethodTable.All.Count, PairMethodTable.All.Select(method => method.Name).Distinct().Count());
        Assert.Equal(AdjustmentTable.All.Count, AdjustmentTable.All.Select(adjustment => adjustment.Name).Distinct().Count());
    }

    [Fact]
    public void Remarks_are_written_in_small_letters_with_hyphens()
    {
        Assert.Equal("ties;no-variation", RemarkCodes.Join(Remarks.NoVariation | Remarks.Ties));
        Assert.Equal("", RemarkCodes.Join(Remarks.None));
    }

    [Fact]
    public void Every_remark_is_described_in_the_page_on_results()
    {
        string page = File.ReadAllText(Repository.Path("docs/results.md"));
        foreach (Remarks remark in Enum.GetValues<Remarks>().Where(remark => remark != Remarks.None))
            Assert.Contains($"| `{WrittenName.Of(remark)}` |", page, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_quantity_of_the_details_is_described_in_the_page_on_results()
    {
        string page = File.ReadAllText(Repository.Path("docs/results.md"));
        Assert.All(WrittenName.All<Quantity>(), name => Assert.Contains($"`{name}`", page, StringComparison.Ordinal));
    }
}
