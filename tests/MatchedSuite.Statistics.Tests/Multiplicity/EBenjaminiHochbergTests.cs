using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class EBenjaminiHochbergTests
{
    [Fact]
    public void The_k_largest_are_rejected_when_the_k_th_reaches_m_over_k_alpha()
    {
        // m = 4 with a missing one beside them: 4/(1·80) = 0.05, 4/(2·40) = 0.05, 4/(3·2) and 4/(4·0.5) are capped at their minimum or 1.
        var adjusted = new Probability[5];
        EBenjaminiHochberg.Adjust([Math.Log10(40), double.NaN, Math.Log10(80), Math.Log10(0.5), Math.Log10(2)], adjusted);
        Assert.Equal([0.05, double.NaN, 0.05, 1, 4.0 / 6], Array.ConvertAll(adjusted, one => Math.Round(one.Value, 14)), new Near());
    }

    [Fact]
    public void Huge_e_values_keep_their_magnitude()
    {
        var adjusted = new Probability[2];
        EBenjaminiHochberg.Adjust([1000, -2000], adjusted);
        Assert.Equal(-1000 + Math.Log10(2), adjusted[0].Log10, 1e-12);
        Assert.Equal(Probability.One, adjusted[1]);
    }

    private sealed class Near : IEqualityComparer<double>
    {
        public bool Equals(double x, double y) => x.Equals(y) || Math.Abs(x - y) < 1e-13;

        public int GetHashCode(double obj) => 0;
    }
}
