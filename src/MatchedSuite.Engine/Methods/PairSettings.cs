using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>What the study file decides for the pair methods of all endpoints.</summary>
/// <param name="Flips">Seed and number of random sign flips.</param>
/// <param name="Zeros">What the signed-rank test does with differences of zero.</param>
public sealed record PairSettings(FlipOptions Flips, ZeroRule Zeros)
{
    /// <summary>The settings of a study.</summary>
    public static PairSettings Of(StudyDefinition study) =>
        new(new FlipOptions { Seed = study.Seed, Resamples = study.Analysis.Resamples }, study.Analysis.Zeros);
}
