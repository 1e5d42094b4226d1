using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Pairs: one comparison of the index with the reference role.</summary>
public sealed class PairsDesign : IDesign
{
    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedMethod[]> _methods;

    /// <summary>Lays out a study of pairs.</summary>
    public PairsDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Arrangement arrangement = inputs.Audit.Arrangement;
        Comparisons = [new PairContrast(PairContrast.IndexReference, arrangement.Places[0], arrangement.Places[1])];
        Contrasts = [PairContrast.IndexReference];
        _methods = study.Analysis.Methods.ToDictionary(
            of => of.Key,
            of => of.Value.Select((name, position) => new PlannedMethod(_codes.CodeOf(name), PairMethodTable.Named(name), position == 0)).ToArray());
    }

    /// <summary>The comparisons, in output order.</summary>
    public IReadOnlyList<PairContrast> Comparisons { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <summary>The methods for a kind of endpoint, the primary one first.</summary>
    public IReadOnlyList<PlannedMethod> MethodsFor(EndpointKind kind) => _methods[kind];

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new PairsEvaluator(plan, this);
}
