using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Repeated visits: two visits at a time, a trend, or all of them at once.</summary>
public sealed class VisitsDesign : IDesign
{
    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedVisitMethod[][]> _methods;

    /// <summary>Lays out a study of visits.</summary>
    /// <exception cref="Storage.RefusalException">No named method makes a comparison that is asked for.</exception>
    public VisitsDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Arrangement arrangement = inputs.Audit.Arrangement;
        IReadOnlyList<string> sentences = VisitComparisons.Check(study, inputs.Catalogue);
        Comparisons = VisitComparisons.Of(study.Design);
        Contrasts = [.. Comparisons.Select(comparison => comparison.Name)];
        Pairs = [.. Comparisons.Select(comparison => PairOf(comparison, inputs, arrangement))];
        SeenAtBoth = [.. Pairs.Select(pair => pair is null ? null : StrataSets.Of(arrangement, set => pair.Index.Has(set) && pair.Reference.Has(set)))];
        FlipSections = FlipPlan.SectionsOf(SeenAtBoth);
        _methods = study.Analysis.Methods.Keys.ToDictionary(
            kind => kind, kind => Comparisons.Select(comparison => Planned(study, kind, comparison.Form)).ToArray());
        if (inputs.Catalogue.HasDetectionLimits)
            AboveBelow = new PlannedMethod(_codes.CodeOf(PairsDesign.AboveBelowMethod), PairMethodTable.Named(PairsDesign.AboveBelowMethod), IsPrimary: false);
        Reference = study.Design.Visit!.ReferencePosition;
        Times = VisitTimes.Of(study.Design.Visit.Order);
        Covariates = SubjectCovariates.Of(inputs);
        Warnings = [.. sentences, .. UnchangingCovariates()];
    }

    /// <summary>The comparisons, in output order.</summary>
    public IReadOnlyList<VisitComparison> Comparisons { get; }

    /// <summary>For each comparison of two visits what pair methods need; null for the others.</summary>
    public IReadOnlyList<PairContrast?> Pairs { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <inheritdoc/>
    public IReadOnlyList<string> Warnings { get; }

    /// <inheritdoc/>
    public IReadOnlyList<FlipSection> FlipSections { get; }

    /// <summary>For each comparison of two visits the subjects seen at both; null for the others.</summary>
    internal IReadOnlyList<StrataSets?> SeenAtBoth { get; }

    /// <summary>Position of the reference visit.</summary>
    public int Reference { get; }

    /// <summary>Times of the visits, that slopes refer to.</summary>
    public double[] Times { get; }

    /// <summary>Covariates of every subject and visit.</summary>
    public SubjectCovariates Covariates { get; }

    /// <summary>The method for values above and below a detection limit; null where no endpoint has one.</summary>
    public PlannedMethod? AboveBelow { get; }

    /// <summary>The methods of a comparison for a kind of endpoint, the primary one first.</summary>
    public ReadOnlySpan<PlannedVisitMethod> MethodsFor(EndpointKind kind, int comparison) => _methods[kind][comparison];

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new VisitsEvaluator(plan, this);

    // The mixed model adjusts for a covariate that never changes; differences cannot.
    private IEnumerable<string> UnchangingCovariates() =>
        Pairs.OfType<PairContrast>()
            .SelectMany(pair => pair.Columns.CollinearNames().Select(name => (Covariate: name, Comparison: $"'{pair.Name}'")))
            .GroupBy(of => of.Covariate)
            .Select(of => $"covariate '{of.Key}' does not change between the visits of {string.Join(", ", of.Select(pair => pair.Comparison))} "
                + "or follows from the others; paired results are not adjusted for it.");

    private static PairContrast? PairOf(VisitComparison comparison, StudyInputs inputs, Arrangement arrangement)
    {
        if (comparison.Form != VisitForms.Difference)
            return null;
        Place index = arrangement.Places[comparison.Index];
        Place reference = arrangement.Places[comparison.Reference];
        return new PairContrast(comparison.Name, index, reference, PairColumns.Of(inputs, index, reference));
    }

    private PlannedVisitMethod[] Planned(StudyDefinition study, EndpointKind kind, VisitForms form) =>
        [.. VisitComparisons.MethodsFor(study, kind, form).Select((name, position) => Planned(name, position == 0))];

    private PlannedVisitMethod Planned(string name, bool isPrimary)
    {
        short code = _codes.CodeOf(name);
        return VisitMethodTable.Named(name) is { } method
            ? new PlannedVisitMethod(code, isPrimary, null, method)
            : new PlannedVisitMethod(code, isPrimary, new PlannedMethod(code, PairMethodTable.Named(name), isPrimary), null);
    }
}
