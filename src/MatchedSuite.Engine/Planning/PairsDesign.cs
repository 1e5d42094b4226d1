using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Pairs: one comparison of the index with the reference role, or the slope on a measured exposure.</summary>
public sealed class PairsDesign : IDesign
{
    /// <summary>Compares values above with values below a detection limit where most values are below.</summary>
    internal const string AboveBelowMethod = "mcnemar-exact";

    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedMethod[]> _methods;

    /// <summary>Lays out a study of pairs.</summary>
    public PairsDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Arrangement arrangement = inputs.Audit.Arrangement;
        string contrast = study.Design.Exposure is null ? PairContrast.IndexReference : PairContrast.PerUnit;
        Place index = arrangement.Places[0];
        Place reference = arrangement.Places[1];
        Comparisons = [new PairContrast(contrast, index, reference, PairColumns.Of(inputs, index, reference))];
        Contrasts = [contrast];
        FlipSections = FlipPlan.SectionsOf([StrataSets.Of(arrangement)]);
        _methods = study.Analysis.Methods.ToDictionary(
            of => of.Key,
            of => of.Value.Select((name, position) => Planned(name, position == 0)).ToArray());
        if (inputs.Catalogue.HasDetectionLimits)
            AboveBelow = Planned(AboveBelowMethod, isPrimary: false);
        Warnings = [.. Comparisons[0].Columns.CollinearNames().Select(CollinearWarning.Of)];
    }

    /// <summary>The comparisons, in output order.</summary>
    public IReadOnlyList<PairContrast> Comparisons { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <inheritdoc/>
    public IReadOnlyList<string> Warnings { get; }

    /// <summary>The method for values above and below a detection limit; null where no endpoint has one.</summary>
    public PlannedMethod? AboveBelow { get; }

    /// <inheritdoc/>
    public IReadOnlyList<FlipSection> FlipSections { get; }

    /// <summary>The methods for a kind of endpoint, the primary one first.</summary>
    public IReadOnlyList<PlannedMethod> MethodsFor(EndpointKind kind) => _methods[kind];

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new PairsEvaluator(plan, this);

    private PlannedMethod Planned(string name, bool isPrimary) => new(_codes.CodeOf(name), PairMethodTable.Named(name), isPrimary);
}
