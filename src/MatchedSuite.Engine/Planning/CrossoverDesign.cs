using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics.Crossover;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Planning;

/// <summary>Crossover of two treatments over two periods: one comparison of the treatments within subjects.</summary>
public sealed class CrossoverDesign : IDesign
{
    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedCrossoverMethod[]> _methods;

    /// <summary>Lays out a crossover.</summary>
    public CrossoverDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Contrasts = [ContrastName(study.Design)];
        Sequences = [.. inputs.Audit.Arrangement.GroupOfSet.Select(group => group == 0 ? TreatmentSequence.IndexFirst : TreatmentSequence.ReferenceFirst)];
        _methods = study.Analysis.Methods.ToDictionary(
            of => of.Key,
            of => of.Value.Select((name, position) => new PlannedCrossoverMethod(_codes.CodeOf(name), CrossoverMethodTable.Named(name), position == 0)).ToArray());
    }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <summary>Sequence of each subject.</summary>
    public TreatmentSequence[] Sequences { get; }

    /// <summary>Name of the comparison.</summary>
    public static string ContrastName(DesignSection design) => $"{design.Treatment!.Index}-{design.Treatment.Reference}";

    /// <summary>The methods for a kind of endpoint, the primary one first.</summary>
    public ReadOnlySpan<PlannedCrossoverMethod> MethodsFor(EndpointKind kind) => _methods[kind];

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new CrossoverEvaluator(plan, this);
}
