using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class StoreyTests
{
    [Fact]
    public void The_share_of_true_nulls_counts_the_large_p_values()
    {
        // Ten tested, three of them above one half: (1 + 3)/(0.5·10).
        Probability[] p = [.. new[] { 0.001, 0.002, 0.01, 0.02, 0.04, 0.2, 0.5, 0.6, 0.7, 0.9, double.NaN }.Select(Probability.Of)];
        Assert.Equal(0.8, StoreyPi0.AtFixed(p), 1e-15);
        Assert.Equal(1, StoreyPi0.AtFixed(p, 0.8), 1e-15);
        var q = PValueVectors.Adjusted(StoreyQ.Adjust, p);
        Assert.Equal(0.8 * 0.01, q[0].Value, 1e-15);
    }

    [Fact]
    public void The_share_is_never_zero_or_above_one()
    {
        Assert.Equal(0.02, StoreyPi0.AtFixed([.. Enumerable.Repeat(Probability.Of(0.01), 100)]), 1e-15);
        Assert.Equal(1, StoreyPi0.AtFixed([.. Enumerable.Repeat(Probability.One, 100)]));
        Assert.Equal(0.01, StoreyPi0.BySpline([.. Enumerable.Repeat(Probability.Of(0.01), 100)]), 1e-15);
        Assert.True(double.IsNaN(StoreyPi0.AtFixed([Probability.Missing])));
        Assert.True(double.IsNaN(StoreyPi0.BySpline([])));
    }

    [Fact]
    public void The_spline_reads_what_base_R_smooth_spline_reads()
    {
        // base R 4.2.2: l <- seq(.05, .95, .05); predict(smooth.spline(l, pi0, df = 3, control.spar = list(tol = 1e-12,
        // low = -1.5, high = 3, maxit = 10000)), .95)$y; its search for the degrees of freedom stops near 1e-6.
        Probability[] squares = [.. Enumerable.Range(1, 200).Select(i => Probability.Of(Math.Pow(i / 201.0, 2)))];
        Probability[] mixture =
        [
            .. Enumerable.Range(1, 100).Select(i => Probability.Of(Math.Pow(i / 101.0, 4))), .. Enumerable.Range(1, 300).Select(i => Probability.Of(i / 301.0)),
        ];
        Assert.Equal(RSquares, StoreyPi0.BySpline(squares), 1e-5);
        Assert.Equal(RMixture, StoreyPi0.BySpline(mixture), 1e-5);
    }

    private const double RSquares = 0.48593111892;
    private const double RMixture = 0.802080681018;
}
