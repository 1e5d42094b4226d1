using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics.Arms;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Change by arm: the change from the reference visit to every other, compared between two arms; the paired change within each arm beside it.</summary>
public sealed class ArmsDesign : IDesign
{
    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedArmMethod[]> _between;
    private readonly Dictionary<EndpointKind, PlannedMethod[]> _within;

    /// <summary>Lays out a study of change by arm.</summary>
    /// <exception cref="RefusalException">No method that compares arms is named for a kind of endpoint.</exception>
    public ArmsDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Arrangement arrangement = inputs.Audit.Arrangement;
        Check(study, inputs.Catalogue);
        Baseline = study.Design.Visit!.ReferencePosition;
        Comparisons = [.. FollowUps(study.Design).Select((visit, position) => Comparison(visit, position, inputs, arrangement))];
        Contrasts = ContrastNames(study.Design);
        SeenAtBoth = [.. Comparisons.Select(comparison => StrataSets.Of(arrangement, subject => IsSeenAtBoth(subject, comparison, arrangement)))];
        Arms = [.. arrangement.GroupOfSet.Select(group => group == 0 ? Arm.Index : Arm.Reference)];
        FlipSections = FlipPlan.SectionsOf([.. SeenAtBoth.SelectMany(strata => (StrataSets?[])[strata, null])], BlocksOf);
        StratumNames = [.. arrangement.Strata, study.Design.Arm!.Index, study.Design.Arm.Reference];
        _between = study.Analysis.Methods.ToDictionary(of => of.Key, of => Between(of.Value));
        _within = study.Analysis.Methods.ToDictionary(of => of.Key, of => Within(of.Key, of.Value));
    }

    /// <summary>One entry a follow-up visit.</summary>
    public IReadOnlyList<ArmComparison> Comparisons { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <inheritdoc/>
    public IReadOnlyList<string> StratumNames { get; }

    /// <inheritdoc/>
    public IReadOnlyList<FlipSection> FlipSections { get; }

    /// <summary>Subjects with samples at both visits of each comparison, by stratum.</summary>
    internal IReadOnlyList<StrataSets> SeenAtBoth { get; }

    /// <summary>Position of the reference visit.</summary>
    public int Baseline { get; }

    /// <summary>Arm of each subject.</summary>
    public Arm[] Arms { get; }

    /// <summary>Names of the contrasts: for each follow-up visit that between arms, then that within arms.</summary>
    public static IReadOnlyList<string> ContrastNames(DesignSection design)
    {
        OrderedGroups visits = design.Visit!;
        TwoGroups arm = design.Arm!;
        return [.. FollowUps(design).Select(visit => $"{visits.Order[visit]}-{visits.Order[visits.ReferencePosition]}")
            .SelectMany(change => (string[])[$"{change}:{arm.Index}-{arm.Reference}", change])];
    }

    /// <summary>Refuses a kind of endpoint for which no method that compares arms is named.</summary>
    /// <exception cref="RefusalException">Names the methods that would do.</exception>
    public static void Check(StudyDefinition study, EndpointCatalogue catalogue)
    {
        foreach (EndpointKind kind in catalogue.Kinds.Where(study.Analysis.Methods.ContainsKey).Order())
        {
            if (study.Analysis.Methods[kind].Any(name => ArmMethodTable.Named(name) is not null))
                continue;
            string key = $"analysis.{WrittenName.Of(kind)}";
            string[] suitable = [.. ArmMethodTable.NamesFor(kind).Where(name => ArmMethodTable.Named(name) is not null)];
            throw new RefusalException(
                $"{Path.GetFileName(study.Path)}, {key}",
                $"none of {Quoted(study.Analysis.Methods[kind])} compares the arms",
                $"one of {Quoted(suitable)} among the methods", $"Add one to {key}; methods for pairs describe each arm alone.");
        }
    }

    /// <summary>Whether a subject has samples at both visits of a comparison.</summary>
    internal bool IsSeenAtBoth(int subject, ArmComparison comparison, Arrangement arrangement) =>
        arrangement.Places[Baseline].Has(subject) && arrangement.Places[comparison.FollowUp].Has(subject);

    /// <summary>The methods that compare arms, the primary one first.</summary>
    public ReadOnlySpan<PlannedArmMethod> BetweenArms(EndpointKind kind) => _between[kind];

    /// <summary>The methods for the change within each arm.</summary>
    public ReadOnlySpan<PlannedMethod> WithinArms(EndpointKind kind) => _within[kind];

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new ArmsEvaluator(plan, this);

    private static IEnumerable<int> FollowUps(DesignSection design) =>
        Enumerable.Range(0, design.Visit!.Order.Count).Where(visit => visit != design.Visit.ReferencePosition);

    private ArmComparison Comparison(int visit, int position, StudyInputs inputs, Arrangement arrangement)
    {
        Place followUp = arrangement.Places[visit];
        Place baseline = arrangement.Places[Baseline];
        string name = $"{followUp.Name}-{baseline.Name}";
        return new ArmComparison((short)(2 * position), visit, new PairContrast(name, followUp, baseline, PairColumns.Of(inputs, followUp, baseline)));
    }

    private PlannedArmMethod[] Between(IReadOnlyList<string> names) =>
        [.. names.Select(ArmMethodTable.Named).OfType<ArmMethod>().Select((method, position) => new PlannedArmMethod(_codes.CodeOf(method.Name), method, position == 0))];

    // Where no method for pairs is named, the usual first one of the kind describes each arm.
    private PlannedMethod[] Within(EndpointKind kind, IReadOnlyList<string> names)
    {
        string[] named = [.. names.Where(name => ArmMethodTable.Named(name) is null)];
        string[] described = named.Length > 0 ? named : [.. KnownNames.UsualMethods(DesignKind.Pairs, kind).Take(1)];
        return [.. described.Select(name => new PlannedMethod(_codes.CodeOf(name), PairMethodTable.Named(name), IsPrimary: false))];
    }

    // Any subject may have been in either arm.
    private RelabelBlocks BlocksOf(int[] subjects) => new([0, subjects.Length], Array.ConvertAll(subjects, subject => Arms[subject] == Arm.Index));

    private static string Quoted(IEnumerable<string> names) => string.Join(", ", names.Select(name => $"'{name}'"));
}
