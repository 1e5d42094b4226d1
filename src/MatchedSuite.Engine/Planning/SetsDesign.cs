using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Statistics.Sets;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Matched sets: one comparison of the index with the reference role within sets of any shape.</summary>
public sealed class SetsDesign : IDesign
{
    /// <summary>Compares values above with values below a detection limit where most values are below.</summary>
    private const string AboveBelowMethod = "mantel-haenszel";

    private readonly SetPart[] _parts;
    private readonly PlannedSetMethod[] _aboveBelow = [];
    private readonly MethodCodes _codes = new();
    private readonly Dictionary<EndpointKind, PlannedSetMethod[]> _methods;

    /// <summary>Lays out a study of matched sets.</summary>
    public SetsDesign(StudyInputs inputs)
    {
        StudyDefinition study = inputs.Study;
        Arrangement arrangement = inputs.Audit.Arrangement;
        Layout = arrangement.Members!;
        IReadOnlyList<Covariate> covariates = inputs.NumbersOf(Layout.SheetRows).Covariates(study.Design.Covariates);
        double[][] columns = [.. covariates.Select(covariate => OnePerMember(covariate.Values))];
        Remarks = arrangement.PeopleInSeveralSets > 0 ? Remarks.ReusedControls : Remarks.None;
        _parts =
        [
            PartOf(ResultRow.AllStrata, [.. Enumerable.Range(0, arrangement.Sets.Length)], columns),
            .. Enumerable.Range(0, arrangement.Strata.Length).Select(stratum =>
                PartOf((short)stratum, SetsOf(stratum, arrangement), columns)),
        ];
        _methods = study.Analysis.Methods.ToDictionary(
            of => of.Key,
            of => of.Value.Select((name, position) => Planned(name, position, of.Key, study.Analysis)).ToArray());
        MostMethods = Math.Max(1, _methods.Values.Select(methods => methods.Length).DefaultIfEmpty().Max());
        if (inputs.Catalogue.HasDetectionLimits)
            _aboveBelow = [Planned(AboveBelowMethod, 1, EndpointKind.Binary, study.Analysis)];
        Warnings = CollinearWarnings(covariates);
        FlipSections = SectionsOf(_parts);
    }

    /// <summary>Who stands in which set and role.</summary>
    public MemberLayout Layout { get; }

    /// <summary>The members of each row: all sets, then each stratum.</summary>
    public ReadOnlySpan<SetPart> Parts => _parts;

    /// <summary>What is remarked of every row.</summary>
    public Remarks Remarks { get; }

    /// <inheritdoc/>
    public IReadOnlyList<string> Contrasts { get; } = [PairContrast.IndexReference];

    /// <inheritdoc/>
    public IReadOnlyList<string> Methods => _codes.Names;

    /// <inheritdoc/>
    public IReadOnlyList<string> Warnings { get; }

    /// <inheritdoc/>
    public IReadOnlyList<FlipSection> FlipSections { get; }

    /// <summary>The methods for a kind of endpoint, the primary one first.</summary>
    public ReadOnlySpan<PlannedSetMethod> MethodsFor(EndpointKind kind) => _methods[kind];

    /// <summary>The largest number of methods of a kind of endpoint.</summary>
    public int MostMethods { get; }

    /// <summary>The one method for values above and below a detection limit; empty where no endpoint has one.</summary>
    public ReadOnlySpan<PlannedSetMethod> AboveBelow => _aboveBelow;

    /// <inheritdoc/>
    public EndpointEvaluator NewEvaluator(AnalysisPlan plan) => new SetsEvaluator(plan, this);

    private PlannedSetMethod Planned(string name, int position, EndpointKind kind, AnalysisSection analysis)
    {
        SetMethod method = SetMethodTable.Named(name);
        return new PlannedSetMethod(_codes.CodeOf(name), method, position == 0, method.Extras(analysis, kind).ToArray());
    }

    private double[] OnePerMember(double[] cells)
    {
        var values = new double[Layout.Count];
        Layout.Cells.Gather(cells, values);
        return values;
    }

    private static int[] SetsOf(int stratum, Arrangement arrangement) =>
        [.. Enumerable.Range(0, arrangement.Sets.Length).Where(set => arrangement.StratumOfSet[set] == stratum)];

    private SetPart PartOf(short stratum, int[] sets, double[][] columns)
    {
        int[] members = [.. sets.SelectMany(set => Enumerable.Range(Layout.Starts[set], Layout.Starts[set + 1] - Layout.Starts[set]))];
        var starts = new int[sets.Length + 1];
        for (int i = 0; i < sets.Length; i++)
            starts[i + 1] = starts[i] + Layout.Starts[sets[i] + 1] - Layout.Starts[sets[i]];
        return new SetPart(
            stratum, members, starts, [.. members.Select(member => Layout.IsIndex[member])],
            [.. columns.SelectMany(column => members.Select(member => column[member]))]);
    }

    private static List<FlipSection> SectionsOf(SetPart[] parts)
    {
        var sections = new List<FlipSection>();
        int offset = 0;
        foreach (SetPart part in parts)
        {
            sections.Add(new FlipSection(0, part.Stratum, offset, part.Members.Length) { Blocks = new RelabelBlocks(part.Starts, part.IsIndex) });
            offset += part.Members.Length;
        }

        return sections;
    }

    private string[] CollinearWarnings(IReadOnlyList<Covariate> covariates)
    {
        SetPart all = _parts[0];
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = SetSample.Of(new double[all.Members.Length], all.Starts, all.IsIndex, all.Covariates, frame);
        return [.. CollinearCovariates.Of(sets, scratch).Select(position => CollinearWarning.Of(covariates[position].Name))];
    }
}
