using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class EBenjaminiHochbergTests
{
    [Fact]
    public void The_k_largest_are_rejected_when_the_k_th_reaches_m_over_k_alpha()
    {
        // Four e-values 80, 40, 2, 0.5 and one missing: 4/(1·80) = 4/(2·40) = 0.05, 4/(3·2) = 2/3, 4/(4·0.5) is capped.
        var adjusted = new Probability[5];
        EBenjaminiHochberg.Adjust([Math.Log10(40), double.NaN, Math.Log10(80), Math.Log10(0.5), Math.Log10(2)], adjusted);
        Assert.Equal(0.05, adjusted[0].Value, 1e-15);
        Assert.True(adjusted[1].IsMissing);
        Assert.Equal(0.05, adjusted[2].Value, 1e-15);
        Assert.Equal(1, adjusted[3].Value);
        Assert.Equal(2.0 / 3, adjusted[4].Value, 1e-14);
    }

    [Fact]
    public void Huge_e_values_keep_their_magnitude()
    {
        var adjusted = new Probability[2];
        EBenjaminiHochberg.Adjust([1000, -2000], adjusted);
        Assert.Equal(-1000 + Math.Log10(2), adjusted[0].Log10, 1e-12);
        Assert.Equal(Probability.One, adjusted[1]);
    }
}
