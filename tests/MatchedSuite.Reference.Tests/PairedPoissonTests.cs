using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>Two Poisson rates given their sum: base R 4.2.2 poisson.test and mpmath at 50 digits (Inputs/README.md).</summary>
public class PairedPoissonTests
{
    // R's two-sided p sums the outcomes that are no more likely; ours doubles the smaller tail, which is listed too.
    private const string OtherConvention = "p_two_minlik";

    private static readonly Dictionary<string, Func<EventTotals, double>> Measures = new()
    {
        ["x1"] = t => PairedPoisson.Run(t, TestOptions.Default).Statistic,
        ["x2"] = t => t.Events - PairedPoisson.Run(t, TestOptions.Default).Statistic,
        ["t1"] = t => t.IndexTime,
        ["t2"] = t => t.ReferenceTime,
        ["rate_ratio"] = t => Math.Exp(PairedPoisson.Run(t, TestOptions.Default).Estimate),
        ["exact95_lo"] = t => Math.Exp(PairedPoisson.Run(t, TestOptions.Default).Interval.Low),
        ["exact95_hi"] = t => Math.Exp(PairedPoisson.Run(t, TestOptions.Default).Interval.High),
        ["p_two_doubled"] = t => PairedPoisson.Run(t, TestOptions.Default).P.Value,
        ["p_greater"] = t => PairedPoisson.Run(t, new TestOptions { Sides = Sides.Greater }).P.Value,
        ["p_less"] = t => PairedPoisson.Run(t, new TestOptions { Sides = Sides.Less }).P.Value,
    };

    [Fact]
    public void Every_quantity_of_every_pair_of_rates_agrees()
    {
        var table = ReferenceTable.Read("expected.csv");
        var (datasets, cases, names) = (table.Texts("dataset"), table.Texts("case"), table.Texts("quantity"));
        int compared = 0;
        for (int row = 0; row < table.Rows; row++)
        {
            if (cases[row] != "paired_poisson" || names[row] == OtherConvention)
                continue;
            string dataset = datasets[row];
            double Of(string quantity) => Expected.Value(dataset, "paired_poisson", quantity);
            var totals = new EventTotals(1, (long)Of("x1"), (long)Of("x2"), Of("t1"), Of("t2"));
            Expected.Check(Measures[names[row]](totals), dataset, "paired_poisson", names[row]);
            compared++;
        }

        Assert.Equal(3 * 10, compared);
    }
}
