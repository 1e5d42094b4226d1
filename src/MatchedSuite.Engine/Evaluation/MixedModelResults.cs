using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>The mixed model of one endpoint: one fit for all comparisons of each row of strata; one worker owns it and reuses it.</summary>
/// <param name="plan">The plan.</param>
/// <param name="comparisons">The comparisons.</param>
/// <param name="strata">Number of rows a comparison has.</param>
/// <param name="scratch">Working memory of the worker.</param>
internal sealed class MixedModelResults(AnalysisPlan plan, IReadOnlyList<VisitComparison> comparisons, int strata, Scratch scratch)
{
    private readonly TestResult[,] _results = new TestResult[strata, comparisons.Count];
    private readonly (double Between, double Within, double Correlation, Interval Interval)[] _components = new (double, double, double, Interval)[strata];

    /// <summary>What one comparison found.</summary>
    public TestResult this[int position, int comparison] => _results[position, comparison];

    /// <summary>Fits one row of strata.</summary>
    /// <param name="position">Which row.</param>
    /// <param name="sample">Its subjects.</param>
    /// <param name="designed">Samples that the matching gives of them.</param>
    public void Fit(int position, in VisitSample sample, int designed)
    {
        using Scratch.Frame frame = scratch.Open();
        MixedModelFit fit = MixedModel.Fit(sample, VisitTerm.Means, frame);
        TestResult? untested = EndpointEvaluator.UntestedBefore(plan, fit.Subjects, fit.Observations, (designed - fit.Observations) / (double)designed);
        for (int comparison = 0; comparison < comparisons.Count; comparison++)
            _results[position, comparison] = untested ?? Test(fit, comparisons[comparison]);
        bool isFitted = untested is null && fit.Outcome == Outcome.Tested;
        _components[position] = isFitted
            ? (fit.VarianceBetween, fit.VarianceWithin, fit.IntraclassCorrelation, VarianceRatioInterval.OfIntraclassCorrelation(fit, plan.Options.Confidence, scratch))
            : (double.NaN, double.NaN, double.NaN, Interval.None);
    }

    /// <summary>Adds variance components and intraclass correlation of a row.</summary>
    public void AddComponents(int position, DetailSink details)
    {
        var (between, within, correlation, interval) = _components[position];
        if (double.IsNaN(within))
            return;
        details.Add(Quantity.VarianceBetween, between);
        details.Add(Quantity.VarianceWithin, within);
        details.Add(Quantity.IntraclassCorrelation, correlation);
        details.Add(Quantity.IntraclassCorrelationLow, interval.Low);
        details.Add(Quantity.IntraclassCorrelationHigh, interval.High);
    }

    private TestResult Test(in MixedModelFit fit, VisitComparison comparison) => comparison.Form switch
    {
        VisitForms.Difference => MixedModel.Difference(fit, comparison.Index, comparison.Reference, plan.Options, scratch),
        VisitForms.Trend => MixedModel.Trend(fit, plan.Options, scratch),
        _ => MixedModel.Omnibus(fit, plan.Options, scratch),
    };
}
