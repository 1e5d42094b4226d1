using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Crossover;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods for crossovers, one line each.</summary>
public static class CrossoverMethodTable
{
    /// <summary>Every method.</summary>
    public static IReadOnlyList<CrossoverMethod> All { get; } =
    [
        new("crossover-t", EndpointKind.Continuous, EstimateScale.Analysis, StrataComparison.Means, CrossoverT.Run) { Extra = PeriodAndCarryOver },
        new("mainland-gart", EndpointKind.Binary, EstimateScale.NaturalLog, StrataComparison.Estimates, MainlandGart.Run),
    ];

    /// <summary>Names of the methods for a kind of endpoint.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind) => [.. All.Where(method => method.Kind == kind).Select(method => method.Name)];

    /// <summary>The method of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static CrossoverMethod Named(string name) =>
        All.FirstOrDefault(method => method.Name == name) ?? throw new KeyNotFoundException($"There is no crossover method '{name}'.");

    private static void PeriodAndCarryOver(in CrossoverSample sample, TestOptions options, Scratch scratch, DetailSink details)
    {
        // The direction asked for concerns treatments; periods and carry-over have none.
        TestOptions twoSided = options.Sides == Sides.Two ? options : options with { Sides = Sides.Two };
        TestResult period = CrossoverT.Period(sample, twoSided, scratch);
        if (period.Outcome == Outcome.Tested)
        {
            details.Add(Quantity.PeriodEffect, period.Estimate);
            details.Add(Quantity.PeriodEffectLow, period.Interval.Low);
            details.Add(Quantity.PeriodEffectHigh, period.Interval.High);
            details.Add(Quantity.PeriodT, period.Statistic);
            details.Add(Quantity.PeriodP, period.P.Value);
        }

        TestResult carryOver = CrossoverT.CarryOver(sample, twoSided, scratch);
        if (carryOver.Outcome != Outcome.Tested)
            return;
        details.Add(Quantity.CarryOver, carryOver.Estimate);
        details.Add(Quantity.CarryOverT, carryOver.Statistic);
        details.Add(Quantity.CarryOverP, carryOver.P.Value);
    }
}
