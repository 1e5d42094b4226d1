using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Reporting;

/// <summary>What the numbers of an effect are: a difference in which unit, a ratio of what.</summary>
internal static class ScaleText
{
    private static readonly string Trend = WrittenName.Of(VisitContrast.Trend);

    /// <summary>The scale of a row's effect, in a few words.</summary>
    public static string Of(SummaryRow row, EndpointSection endpoints)
    {
        if (double.IsNaN(row.Row.Estimate))
            return "–";
        bool perDeviation = endpoints.PerStandardDeviation && row.Endpoint.Kind == EndpointKind.Continuous;
        string unit = perDeviation ? "SD" : row.Endpoint.Unit ?? "";
        if (row.Contrast == Trend)
            return (LogBase)row.Row.LogBase != LogBase.None ? "ratio per unit of time" : $"{(unit.Length > 0 ? $"slope, {unit}" : "slope")} per unit of time";
        if ((LogBase)row.Row.LogBase == LogBase.None)
            return unit.Length > 0 ? $"difference, {unit}" : "difference";
        if (row.Method == KnownNames.ConditionalLogistic)
            return row.Endpoint.Kind == EndpointKind.Binary ? "odds ratio" : $"odds ratio per {(perDeviation ? unit : StepOf(row, unit))}";
        return row.Endpoint.Kind switch
        {
            EndpointKind.Binary => "odds ratio",
            EndpointKind.Count => "rate ratio",
            _ => "ratio",
        };
    }

    // One more of what the model is linear in.
    private static string StepOf(SummaryRow row, string unit) => (row.Endpoint.Kind, row.Endpoint.Transform) switch
    {
        (EndpointKind.Ordinal, _) => "level",
        (EndpointKind.Count, _) => "event",
        (_, Transform.Log2) => "doubling",
        (_, Transform.Log10) => "tenfold",
        (_, Transform.Log) => "e-fold",
        (_, Transform.Sqrt) => "unit of the root",
        (_, Transform.RankNormal) => "normal score",
        _ => unit.Length > 0 ? unit : "unit",
    };
}
