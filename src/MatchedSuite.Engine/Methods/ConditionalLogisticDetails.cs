using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>Conditional logistic regression with the numbers that stand beside its row.</summary>
internal static class ConditionalLogisticDetails
{
    // Scores with more levels than this are better taken as numbers than as categories.
    private const int MostLevels = 12;

    /// <summary>The row by Wald's test; log-likelihoods, likelihood-ratio and score test as details.</summary>
    public static TestResult Test(in SetSample sets, TestOptions options, Scratch scratch, DetailSink details)
    {
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets, options, scratch);
        if (fit.Outcome == Outcome.Tested)
        {
            details.Add(Quantity.LogLikelihood, fit.LogLikelihood);
            details.Add(Quantity.LogLikelihoodWithout, fit.LogLikelihoodOfCovariates);
            details.Add(Quantity.LikelihoodRatio, fit.LikelihoodRatio.Statistic);
            details.Add(Quantity.LikelihoodRatioP, Quantity.LikelihoodRatioLog10P, fit.LikelihoodRatio.P);
            details.Add(Quantity.Score, fit.Score.Statistic);
            details.Add(Quantity.ScoreP, Quantity.ScoreLog10P, fit.Score.P);
        }

        return fit.Test(options.Sides);
    }

    /// <summary>Profile limits where the study asks for them; an omnibus test over the levels of ordinal endpoints.</summary>
    public static IReadOnlyList<SetExtra> Extras(AnalysisSection analysis, EndpointKind kind)
    {
        var extras = new List<SetExtra>();
        if (analysis.Intervals.Contains(IntervalKind.Profile))
            extras.Add(AddProfile);
        if (kind == EndpointKind.Ordinal)
            extras.Add(AddCategories);
        return extras;
    }

    private static void AddProfile(in SetSample sets, TestOptions options, Scratch scratch, DetailSink details)
    {
        Interval interval = ConditionalLogistic.ProfileInterval(sets, options, scratch);
        details.Add(Quantity.ProfileLow, interval.Low);
        details.Add(Quantity.ProfileHigh, interval.High);
    }

    // With two levels the categories say what the trend says.
    private static void AddCategories(in SetSample sets, TestOptions options, Scratch scratch, DetailSink details)
    {
        using Scratch.Frame frame = scratch.Open();
        Span<double> levels = frame.Doubles(MostLevels + 1);
        int count = 0;
        foreach (double value in sets.Values)
        {
            int place = levels[..count].BinarySearch(value);
            if (place >= 0)
                continue;
            if (count == MostLevels)
                return;
            levels[~place..count].CopyTo(levels[(~place + 1)..]);
            levels[~place] = value;
            count++;
        }

        if (count < 3)
            return;
        TestResult omnibus = ConditionalLogisticCategories.Run(sets, levels[..count], options, scratch);
        if (omnibus.Outcome != Outcome.Tested)
            return;
        details.Add(Quantity.CategoriesLikelihoodRatio, omnibus.Statistic);
        details.Add(Quantity.CategoriesDf, omnibus.DegreesOfFreedom);
        details.Add(Quantity.CategoriesP, Quantity.CategoriesLog10P, omnibus.P);
    }
}
