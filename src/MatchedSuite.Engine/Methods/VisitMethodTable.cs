using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods for repeated visits, one line each; a new method is one more line. Two visits are also compared by the methods for pairs.</summary>
public static class VisitMethodTable
{
    private static readonly EndpointKind[] Continuous = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Binary = [EndpointKind.Binary];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal, EndpointKind.Count];

    /// <summary>Every method, the usual first choice of a comparison before the others.</summary>
    public static IReadOnlyList<VisitMethod> All { get; } =
    [
        new("rm-anova", Continuous, VisitForms.Omnibus, StrataComparison.None) { Test = RepeatedMeasuresAnova.GreenhouseGeisser, Extra = Sphericity },
        new("rm-anova-hf", Continuous, VisitForms.Omnibus, StrataComparison.None) { Test = RepeatedMeasuresAnova.HuynhFeldt, Extra = Sphericity },
        new("rm-anova-raw", Continuous, VisitForms.Omnibus, StrataComparison.None) { Test = RepeatedMeasuresAnova.Uncorrected, Extra = Sphericity },
        new("friedman", Ordered, VisitForms.Omnibus, StrataComparison.None) { Test = Friedman.Run, Extra = Concordance },
        new("cochran-q", Binary, VisitForms.Omnibus, StrataComparison.None) { Test = CochranQ.Run },
        new("linear-trend", Continuous, VisitForms.Trend, StrataComparison.Means) { Test = LinearTrend.Run },
        new("page-trend", Ordered, VisitForms.Trend, StrataComparison.None) { Test = PageTrend.Run, Extra = Trend },
        new("mixed-model", Continuous, VisitForms.Difference | VisitForms.Trend | VisitForms.Omnibus, StrataComparison.Means),
    ];

    /// <summary>Names of the methods for a kind of endpoint, those for pairs first.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind)
    {
        IReadOnlyList<string> known = KnownNames.MethodsFor(DesignKind.Visits, kind);
        return [.. PairMethodTable.NamesFor(kind).Concat(All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name)).Where(known.Contains)];
    }

    /// <summary>The comparisons that a method can make.</summary>
    public static VisitForms FormsOf(string name) => Named(name)?.Forms ?? VisitForms.Difference;

    /// <summary>The method of this name; null where it is one for pairs.</summary>
    public static VisitMethod? Named(string name) => All.FirstOrDefault(method => method.Name == name);

    private static void Sphericity(in VisitSample sample, Scratch scratch, DetailSink details)
    {
        RepeatedMeasuresAnovaFit fit = RepeatedMeasuresAnova.Fit(sample, scratch);
        details.Add(Quantity.GreenhouseGeisserEpsilon, fit.GreenhouseGeisser);
        details.Add(Quantity.HuynhFeldtEpsilon, fit.HuynhFeldt);
        if (fit.Sphericity.P.IsMissing)
            return;
        details.Add(Quantity.MauchlyW, fit.Sphericity.W);
        details.Add(Quantity.MauchlyP, fit.Sphericity.P.Value);
    }

    private static void Concordance(in VisitSample sample, Scratch scratch, DetailSink details)
    {
        FriedmanFit fit = Friedman.Fit(sample, scratch);
        details.Add(Quantity.KendallW, fit.KendallW);
        details.Add(Quantity.ImanDavenportF, fit.ImanDavenportF);
        details.Add(Quantity.ImanDavenportP, fit.ImanDavenportP.Value);
    }

    private static void Trend(in VisitSample sample, Scratch scratch, DetailSink details) =>
        details.Add(Quantity.PageZ, PageTrend.Fit(sample, scratch).Z);
}
