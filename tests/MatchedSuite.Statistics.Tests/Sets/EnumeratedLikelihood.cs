namespace MatchedSuite.Statistics.Tests.Sets;

/// <summary>The conditional likelihood by its definition: every subset of the members listed and weighed.</summary>
internal static class EnumeratedLikelihood
{
    /// <summary>Log-likelihood, gradient and information of columns that hold the covariates, then the values.</summary>
    public static (double LogLikelihood, double[] Gradient, double[,] Information) Evaluate(DrawnSets sets, double[] beta)
    {
        int columns = beta.Length, total = sets.Values.Length;
        double[] design = [.. sets.Covariates, .. sets.Values];
        double logLikelihood = 0;
        var gradient = new double[columns];
        var information = new double[columns, columns];
        for (int s = 0; s < sets.Count; s++)
        {
            int first = sets.Starts[s], members = sets.Starts[s + 1] - first;
            uint chosen = 0;
            for (int i = 0; i < members; i++)
                chosen |= sets.IsIndex[first + i] ? 1u << i : 0;
            double[] observed = SumOf(chosen);
            double weights = 0;
            var sums = new double[columns];
            var products = new double[columns, columns];
            for (uint subset = 0; subset < 1u << members; subset++)
            {
                if (uint.PopCount(subset) != uint.PopCount(chosen))
                    continue;
                double[] x = SumOf(subset);
                double weight = Math.Exp(Dot(x) - Dot(observed));
                weights += weight;
                for (int c = 0; c < columns; c++)
                {
                    sums[c] += weight * x[c];
                    for (int d = 0; d < columns; d++)
                        products[c, d] += weight * x[c] * x[d];
                }
            }

            logLikelihood -= Math.Log(weights);
            for (int c = 0; c < columns; c++)
            {
                gradient[c] += observed[c] - (sums[c] / weights);
                for (int d = 0; d < columns; d++)
                    information[c, d] += (products[c, d] / weights) - (sums[c] / weights * (sums[d] / weights));
            }

            double[] SumOf(uint subset) =>
                [.. Enumerable.Range(0, columns).Select(c => Enumerable.Range(0, members)
                    .Where(i => (subset >> i & 1) == 1).Sum(i => design[(c * total) + first + i]))];
        }

        return (logLikelihood, gradient, information);

        double Dot(double[] x) => Enumerable.Range(0, columns).Sum(c => x[c] * beta[c]);
    }
}
