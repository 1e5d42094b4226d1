using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class ConditionalLikelihoodTests
{
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    public void The_likelihood_of_any_shape_equals_the_one_with_every_subset_listed(int covariates) =>
        DrawnSets.AnyShape(1, 9, covariates).SelectMany(sets => Gen.Double[-1, 1].Array[covariates + 1], (sets, beta) => (sets, beta)).Sample(draw =>
        {
            var (sets, beta) = draw;
            int columns = beta.Length;
            var (expected, slopes, curvatures) = EnumeratedLikelihood.Evaluate(sets, beta);
            var gradient = new double[columns];
            var information = new double[columns * columns];
            double found = Evaluate(sets, beta, gradient, information);
            Assert.Equal(expected, found, 1e-12 * Math.Max(1, Math.Abs(expected)));
            for (int c = 0; c < columns; c++)
            {
                Assert.Equal(slopes[c], gradient[c], 1e-10);
                for (int d = 0; d <= c; d++)
                    Assert.Equal(curvatures[c, d], information[(c * columns) + d], 1e-10);
            }
        });

    [Theory]
    [InlineData(500.0)]
    [InlineData(-500.0)]
    [InlineData(1e6)]
    public void Far_from_zero_the_likelihood_stays_finite_and_linear(double beta)
    {
        // 3:3 and 1:2 sets; far out the set's best subset decides, so the log-likelihood is beta times (chosen − best).
        var sets = new DrawnSets([3, 1, 2, 0.5, 2.5, 1.5, 2, 1, 4], [0, 6, 9], [true, true, true, false, false, false, true, false, false], []);
        double expected = beta > 0 ? beta * ((6 - 7.5) + (2 - 4)) : beta * ((6 - 3) + (2 - 1));
        Assert.Equal(expected, Evaluate(sets, [beta], new double[1], new double[1]), 1e-9 * Math.Abs(expected));
    }

    [Fact]
    public void Large_sets_neither_overflow_nor_underflow()
    {
        // All values 0: every subset is as likely, so the likelihood is 1 / (3000 choose 1200).
        const int members = 3000, index = 1200;
        bool[] isIndex = [.. Enumerable.Range(0, members).Select(i => i < index)];
        double found = Evaluate(new DrawnSets(new double[members], [0, members], isIndex, []), [0.5], new double[1], new double[1]);
        double expected = 0;
        for (int i = 1; i <= index; i++)
            expected -= Math.Log((double)(members - index + i) / i);
        Assert.Equal(expected, found, 1e-11 * Math.Abs(expected));
    }

    private static double Evaluate(DrawnSets sets, double[] beta, double[] gradient, double[] information)
    {
        using Scratch.Frame frame = new Scratch().Open();
        SetSample sample = sets.Take(frame);
        double[] design = [.. sample.Covariates, .. sample.Values];
        return ConditionalLikelihood.Of(sample, design, beta.Length, frame).Evaluate(beta, gradient, information);
    }
}
