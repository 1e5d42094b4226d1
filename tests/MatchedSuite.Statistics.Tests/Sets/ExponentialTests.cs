using System.Runtime.Intrinsics;
using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class ExponentialTests
{
    [Fact]
    public void The_four_lanes_and_the_plain_twin_give_the_same_bits() =>
        Gen.Double[-800, 800].Array[4].Sample(x =>
        {
            Vector256<double> lanes = Exponential.Of(Vector256.Create(x[0], x[1], x[2], x[3]));
            for (int i = 0; i < 4; i++)
                Assert.Equal(BitConverter.DoubleToInt64Bits(Exponential.Of(x[i])), BitConverter.DoubleToInt64Bits(lanes[i]));
        });

    [Fact]
    public void It_agrees_with_the_runtimes_exponential_to_a_few_units_in_the_last_place() =>
        Gen.Double[-700, 700].Sample(x => Assert.Equal(1, Exponential.Of(x) / Math.Exp(x), 1e-15));

    [Fact]
    public void Zero_gives_exactly_one() => Assert.Equal(1.0, Exponential.Of(0.0));

    [Fact]
    public void The_logarithm_agrees_with_the_runtimes() =>
        Gen.Double[-600, 600].Sample(x => Assert.Equal(Math.Log(Math.Exp(x)), NaturalLogarithm.Of(Math.Exp(x)), 4e-16 * (1 + Math.Abs(x))));
}
