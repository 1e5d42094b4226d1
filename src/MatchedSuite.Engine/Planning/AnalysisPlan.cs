using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>What a run computes on every endpoint, fixed before the first value is read.</summary>
public sealed class AnalysisPlan
{
    private readonly IReadOnlyList<string> _samples;
    private readonly IDesign _design;

    /// <summary>Lays out a study whose inputs are open.</summary>
    public AnalysisPlan(StudyInputs inputs)
    {
        Study = inputs.Study;
        Catalogue = inputs.Catalogue;
        Arrangement = inputs.Audit.Arrangement;
        SourceColumns = inputs.SourceColumns();
        Options = new TestOptions
        {
            Sides = Study.Analysis.Sides,
            Confidence = Study.Analysis.Confidence,
            Resamples = Study.Analysis.Resamples,
            Seed = Study.Seed,
        };
        AdjustmentRules.Check(Study, Catalogue);
        Adjustments = [.. Study.Analysis.Adjust.Select(AdjustmentTable.Named)];
        _samples = inputs.Source.Samples;
        _design = DesignTable.Lay(inputs);
        Flips = AdjustmentRules.StatisticOf(Study, Catalogue) is { } statistic ? new FlipPlan(statistic, _design.FlipSections) : null;
    }

    /// <summary>The study.</summary>
    public StudyDefinition Study { get; }

    /// <summary>What is known of each endpoint.</summary>
    public EndpointCatalogue Catalogue { get; }

    /// <summary>Which sample stands where.</summary>
    public Arrangement Arrangement { get; }

    /// <summary>Where the used samples stand in the file of measurements, in the order of <see cref="Arrangement.Rows"/>.</summary>
    public int[] SourceColumns { get; }

    /// <summary>The file of measurements, for messages.</summary>
    public string ValuesFile => Path.GetFileName(Study.Data.Values ?? Study.Data.Samples);

    /// <summary>Names of the comparisons; a row's contrast code is a position here.</summary>
    public IReadOnlyList<string> Contrasts => _design.Contrasts;

    /// <summary>Names of all planned methods; a row's method code is a position here.</summary>
    public IReadOnlyList<string> MethodNames => _design.Methods;

    /// <summary>What looks odd once the design is laid out, one sentence each.</summary>
    public IReadOnlyList<string> Warnings => _design.Warnings;

    /// <summary>Direction and confidence of every test.</summary>
    public TestOptions Options { get; private set; }

    /// <summary>The adjustments asked for.</summary>
    public IReadOnlyList<Adjustment> Adjustments { get; }

    /// <summary>What is kept of every endpoint for adjustments by sign flips; null where none is asked for.</summary>
    public FlipPlan? Flips { get; private set; }

    /// <summary>The same methods with intervals of another confidence; nothing is kept for flips.</summary>
    public AnalysisPlan At(double confidence)
    {
        var other = (AnalysisPlan)MemberwiseClone();
        other.Options = Options with { Confidence = confidence };
        other.Flips = null;
        return other;
    }

    /// <summary>An evaluator for one worker.</summary>
    public EndpointEvaluator NewEvaluator() => _design.NewEvaluator(this);

    /// <summary>Name of a stratum as the results write it: empty for all sets, <c>difference</c> for the test between strata.</summary>
    public string StratumName(short stratum) => stratum switch
    {
        ResultRow.AllStrata => "",
        ResultRow.BetweenStrata => "difference",
        _ => _design.StratumNames.Count > 0 ? _design.StratumNames[stratum] : Arrangement.Strata[stratum],
    };

    /// <summary>Name of a used sample, by its position in a row of values.</summary>
    public string SampleName(int position) => _samples[SourceColumns[position]];

    /// <summary>Name of a contrast; of all of them where hypotheses are adjusted across contrasts.</summary>
    public string ContrastName(short contrast) => contrast == HypothesisGroup.AllContrasts ? "all" : Contrasts[contrast];

    /// <summary>The level an adjusted p-value is compared with.</summary>
    public double LevelOf(Adjustment adjustment) =>
        adjustment.Controls == ErrorRate.FamilyWise ? Study.Analysis.Alpha : Study.Analysis.Fdr;
}
