using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

/// <summary>The vector loops against their plain twins, bit for bit.</summary>
public class FixedLanesTests
{
    private static readonly Gen<double[]> Columns = Gen.Double[-1e6, 1e6].Array[1, 40];

    [Fact]
    public void Sums_are_those_of_four_plain_lanes() =>
        Columns.Sample(values => Assert.Equal(InFourLanes(values, v => v), FixedLanes.Sum(values)));

    [Fact]
    public void Moments_are_those_of_four_plain_lanes() =>
        Gen.Select(Columns, Gen.Double[-1e6, 1e6]).Sample((values, centre) =>
        {
            var (deviations, squares) = FixedLanes.Moments(values, centre);
            Assert.Equal(InFourLanes(values, v => v - centre), deviations);
            Assert.Equal(InFourLanes(values, v => (v - centre) * (v - centre)), squares);
        });

    [Fact]
    public void Extremes_are_the_extremes() =>
        Columns.Sample(values =>
        {
            Assert.Equal(values.Max(), FixedLanes.Largest(values));
            Assert.Equal(values.Min(), FixedLanes.Smallest(values));
        });

    [Fact]
    public void One_more_rank_moves_half_of_every_sum_as_the_plain_loop_does() =>
        Gen.Select(Gen.Double[0, 1].Array[1, 40], Gen.Int[1, 45]).Sample((mass, rank) =>
        {
            double[] plain = [.. mass.Select((m, w) => 0.5 * (w >= rank ? mass[w - rank] + m : m))];
            RankSumStep.AddRank(mass, rank);
            Assert.Equal(plain, mass);
        });

    private static double InFourLanes(double[] values, Func<double, double> term)
    {
        double[] lanes = new double[4];
        int whole = values.Length - (values.Length % 4);
        for (int i = 0; i < whole; i++)
            lanes[i % 4] += term(values[i]);
        double sum = (lanes[0] + lanes[1]) + (lanes[2] + lanes[3]);
        for (int i = whole; i < values.Length; i++)
            sum += term(values[i]);
        return sum;
    }
}
