using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Which logarithm an estimate is on, from its method and the endpoint's transform.</summary>
public static class EstimateLogBase
{
    /// <summary>The base; <see cref="LogBase.None"/> where exponentiating would give no ratio.</summary>
    public static LogBase Of(EstimateScale scale, Transform transform) => (scale, transform) switch
    {
        (EstimateScale.NaturalLog, _) => LogBase.Natural,
        (_, Transform.Log) => LogBase.Natural,
        (_, Transform.Log2) => LogBase.Two,
        (_, Transform.Log10) => LogBase.Ten,
        _ => LogBase.None,
    };
}
