using CsCheck;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

public class VisitSampleTests
{
    private delegate TestResult Method(in VisitSample sample, TestOptions options, Scratch scratch);

    private static readonly Method[] All =
    [
        RepeatedMeasuresAnova.GreenhouseGeisser, RepeatedMeasuresAnova.HuynhFeldt, RepeatedMeasuresAnova.Uncorrected,
        Friedman.Run, PageTrend.Run, LinearTrend.Run, MixedModel.Run,
    ];

    [Fact]
    public void Complete_keeps_the_subjects_seen_at_every_visit_in_order()
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        double missing = double.NaN;
        var complete = VisitSample.Of([1, 2, 3, missing, 5, 6, missing, missing], 2, frame).Complete(frame);
        Assert.Equal(2, complete.Subjects);
        Assert.Equal([1, 2, 5, 6], complete.Values.ToArray());
    }

    [Fact]
    public void Tables_that_are_none_are_refused()
    {
        Assert.Throws<ArgumentException>(() => VisitSample.Of([1, 2, 3], [0]).Visits);
        Assert.Throws<ArgumentException>(() => VisitSample.Of([1, 2, 3], [0, 1]).Visits);
        Assert.Throws<ArgumentException>(() => VisitSample.Of([1, 2], [1, 1]).Visits);
        Assert.Throws<ArgumentException>(() => VisitSample.Of([1, 2], [1, double.NaN]).Visits);
        Assert.Throws<ArgumentException>(() => VisitSample.Of([1, 2], [0, 1]).WithCovariates([1, 2, 3], 1).Visits);
    }

    [Fact]
    public void Whatever_the_table_a_tested_endpoint_has_a_p_value_and_an_untested_one_has_none()
    {
        var tables =
            from table in Gen.OneOf(VisitTable.Gappy(1, 6, 2, 6), VisitTable.Coarse(1, 6, 2, 5), VisitTable.Complete(1, 5, 2, 6))
            from gaps in Gen.Int[0, 4].Array[table.Values.Length]
            from scale in Gen.OneOf(Gen.Const(1.0), Gen.Const(1e-140), Gen.Const(1e140))
            from offset in Gen.OneOf(Gen.Const(0.0), Gen.Const(1e7))
            select table with { Values = [.. table.Values.Select((value, at) => gaps[at] == 0 ? double.NaN : scale * (value + offset))] };
        tables.Sample(table =>
        {
            foreach (var method in All)
            {
                var result = method(table.Sample(), TestOptions.Default, new Scratch());
                if (result.Outcome == Outcome.Tested)
                    Assert.InRange(result.P.Value, 0, 1);
                else
                    Assert.True(result.P.IsMissing && result.Remarks != Remarks.None);
            }
        }, iter: 3000);
    }
}
