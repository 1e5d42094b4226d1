using System.Globalization;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

/// <summary>Error rates over invented studies of 20 endpoints on 16 pairs, endpoints independent or correlated 0.5 with each other.</summary>
/// <remarks>Bounds are three standard errors of the simulated rate. CALIBRATION_STUDIES asks for another number of studies.</remarks>
public class CalibrationTests
{
    private const int Endpoints = 20;
    private const int Pairs = 16;
    private const int Effects = 5;
    private const double Level = 0.1;

    private static readonly int Studies =
        int.Parse(Environment.GetEnvironmentVariable("CALIBRATION_STUDIES") ?? "1000", CultureInfo.InvariantCulture);

    private static double StandardError => Math.Sqrt(Level * (1 - Level) / Studies);

    [Theory]
    [InlineData(0)]
    [InlineData(0.5)]
    public void Holm_and_max_t_reject_a_true_null_in_no_more_studies_than_alpha(double correlation)
    {
        int holm = 0, maxT = 0, holmBesideEffects = 0, maxTBesideEffects = 0;
        Simulate(correlation, 0, (number, differences, p) =>
        {
            holm += CountAtMost(Adjusted(Holm.Adjust, p)) > 0 ? 1 : 0;
            maxT += CountAtMost(MaxTAdjusted(differences, number)) > 0 ? 1 : 0;
        });
        Simulate(correlation, 0.9, (number, differences, p) =>
        {
            holmBesideEffects += CountAtMost(Adjusted(Holm.Adjust, p).AsSpan(Effects)) > 0 ? 1 : 0;
            maxTBesideEffects += CountAtMost(MaxTAdjusted(differences, number).AsSpan(Effects)) > 0 ? 1 : 0;
        });

        Assert.InRange((double)holm / Studies, 0.02, Level + 3 * StandardError);
        Assert.InRange((double)holmBesideEffects / Studies, 0.02, Level + 3 * StandardError);
        Assert.InRange((double)maxTBesideEffects / Studies, 0.02, Level + 3 * StandardError);

        // With 199 flips, alpha is reached exactly when no endpoint has an effect.
        Assert.InRange((double)maxT / Studies, Level - 3 * StandardError, Level + 3 * StandardError);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(0.5)]
    public void Step_ups_keep_the_mean_share_of_false_discoveries_below_the_level(double correlation)
    {
        double bh = 0, by = 0, twoStage = 0;
        int discoveries = 0;
        Simulate(correlation, 0.9, (_, _, p) =>
        {
            var adjusted = Adjusted(BenjaminiHochberg.Adjust, p);
            discoveries += CountAtMost(adjusted.AsSpan(0, Effects));
            bh += FalseShare(adjusted);
            by += FalseShare(Adjusted(BenjaminiYekutieli.Adjust, p));
            twoStage += FalseShare(Adjusted(TwoStageBenjaminiHochberg.Adjust, p));
        });

        // The share lies between 0 and 1, so its spread is at most that of a count with the same mean.
        Assert.InRange(by / Studies, 0.001, Level + 3 * StandardError);
        Assert.InRange(bh / Studies, by / Studies, Level * (Endpoints - Effects) / Endpoints + 3 * StandardError);
        Assert.InRange(twoStage / Studies, 0.03, Level + 3 * StandardError);
        Assert.True(discoveries > Studies * Effects / 2, $"{discoveries} true discoveries in {Studies} studies show nothing.");
    }

    [Fact]
    public void Max_t_finds_more_than_Holm_where_endpoints_move_together()
    {
        int holm = 0, maxT = 0;
        Simulate(0.5, 0.9, (number, differences, p) =>
        {
            holm += CountAtMost(Adjusted(Holm.Adjust, p).AsSpan(0, Effects));
            maxT += CountAtMost(MaxTAdjusted(differences, number).AsSpan(0, Effects));
        });
        Assert.True(maxT > holm, $"max-t {maxT}, Holm {holm} true discoveries.");
    }

    private static void Simulate(double correlation, double effect, Action<int, double[], Probability[]> study)
    {
        var differences = new double[Endpoints * Pairs];
        var p = new Probability[Endpoints];
        for (int number = 0; number < Studies; number++)
        {
            for (int j = 0; j < Endpoints; j++)
            {
                for (int i = 0; i < Pairs; i++)
                    differences[j * Pairs + i] = (j < Effects ? effect : 0)
                        + Math.Sqrt(correlation) * Normal(number, i) + Math.Sqrt(1 - correlation) * Normal(number, (j + 1) * Pairs + i);
                p[j] = PairedTP(differences.AsSpan(j * Pairs, Pairs));
            }

            study(number, differences, p);
        }
    }

    private static Probability PairedTP(ReadOnlySpan<double> differences)
    {
        double sum = 0, squares = 0;
        foreach (double d in differences)
            sum += d;
        foreach (double d in differences)
            squares += (d - sum / Pairs) * (d - sum / Pairs);
        return StudentT.UpperTail(Math.Abs(sum) / Math.Sqrt(Pairs * squares / (Pairs - 1)), Pairs - 1).Times(2);
    }

    private static double Normal(int study, int number) =>
        StandardNormal.UpperQuantile(double.Max(CounterRandom.Uniform(99, RandomPurpose.Invention, study, number), 1e-18));

    private static Probability[] Adjusted(Adjustment procedure, Probability[] p) => PValueVectors.Adjusted(procedure, p);

    private static Probability[] MaxTAdjusted(double[] differences, int number) =>
        [.. MaxT.Run(new DifferenceTable(differences, Pairs), new ResamplingOptions { Seed = number, Resamples = 199, Threads = 1 }).StepDown];

    private static int CountAtMost(ReadOnlySpan<Probability> adjusted)
    {
        int count = 0;
        foreach (var one in adjusted)
            count += one.IsAtMost(Level) ? 1 : 0;
        return count;
    }

    private static double FalseShare(Probability[] adjusted) =>
        (double)CountAtMost(adjusted.AsSpan(Effects)) / Math.Max(1, CountAtMost(adjusted));
}
