using MatchedSuite.Engine.Evaluation;

namespace MatchedSuite.Engine.Planning;

/// <summary>What a kind of design computes on every endpoint.</summary>
public interface IDesign
{
    /// <summary>Names of the comparisons, in output order; a row's contrast code is a position here.</summary>
    IReadOnlyList<string> Contrasts { get; }

    /// <summary>Names of the methods; a row's method code is a position here.</summary>
    IReadOnlyList<string> Methods { get; }

    /// <summary>What looks odd once the design is laid out, one sentence each.</summary>
    IReadOnlyList<string> Warnings => [];

    /// <summary>The values that evaluators keep of each endpoint when sets are flipped or labels exchanged, one part a contrast and stratum; none where they keep none.</summary>
    IReadOnlyList<FlipSection> FlipSections => [];

    /// <summary>Names of the strata and groups that rows name by position, where they are others than the arrangement's strata; else empty.</summary>
    IReadOnlyList<string> StratumNames => [];

    /// <summary>An evaluator for one worker.</summary>
    EndpointEvaluator NewEvaluator(AnalysisPlan plan);
}
