using MatchedSuite.Storage.Values;

namespace MatchedSuite.Study.Definition;

/// <summary>What this version can do of all that a study file may ask; the rest is refused with the list of what is here.</summary>
public sealed record Capabilities
{
    /// <summary>Kinds of design.</summary>
    public required IReadOnlySet<DesignKind> Designs { get; init; }

    /// <summary>Layouts of the file of measurements.</summary>
    public required IReadOnlySet<ValueLayout> Layouts { get; init; }

    /// <summary>Method names by design and kind of endpoint, in the order in which they are listed to the user.</summary>
    public required IReadOnlyDictionary<(DesignKind Design, EndpointKind Endpoint), IReadOnlyList<string>> Methods { get; init; }

    /// <summary>The methods taken where the study file names none; a kind without an entry has no default.</summary>
    public required IReadOnlyDictionary<(DesignKind Design, EndpointKind Endpoint), IReadOnlyList<string>> DefaultMethods { get; init; }

    /// <summary>Names of the adjustments.</summary>
    public required IReadOnlyList<string> Adjustments { get; init; }

    /// <summary>Transforms of endpoints.</summary>
    public required IReadOnlySet<Transform> Transforms { get; init; }

    /// <summary>Over which hypotheses an adjustment can run.</summary>
    public required IReadOnlySet<FamilyRule> Families { get; init; }

    /// <summary>Intervals beside the marginal ones.</summary>
    public IReadOnlySet<IntervalKind> Intervals { get; init; } = new HashSet<IntervalKind>();

    /// <summary>Further intervals that designs of a kind alone have.</summary>
    public IReadOnlyDictionary<DesignKind, IReadOnlyList<IntervalKind>> IntervalsOfDesign { get; init; } = new Dictionary<DesignKind, IReadOnlyList<IntervalKind>>();

    /// <summary>Comparisons between visits.</summary>
    public IReadOnlySet<VisitContrast> Contrasts { get; init; } = new HashSet<VisitContrast>();

    /// <summary>Those of <see cref="StudyKeys.Optional"/> that have an effect in this version, whatever the design.</summary>
    public IReadOnlySet<string> Keys { get; init; } = new HashSet<string>();

    /// <summary>Further keys of <see cref="StudyKeys.Optional"/> that have an effect in designs of a kind alone.</summary>
    public IReadOnlyDictionary<DesignKind, IReadOnlyList<string>> KeysOfDesign { get; init; } = new Dictionary<DesignKind, IReadOnlyList<string>>();

    /// <summary>The whole language of the study file, as the published schema describes it.</summary>
    public static Capabilities Everything { get; } = new()
    {
        Designs = Enum.GetValues<DesignKind>().ToHashSet(),
        Layouts = Enum.GetValues<ValueLayout>().ToHashSet(),
        Methods = ByDesignAndEndpoint(KnownNames.MethodsFor),
        DefaultMethods = ByDesignAndEndpoint(KnownNames.UsualMethods),
        Adjustments = KnownNames.Adjustments,
        Transforms = Enum.GetValues<Transform>().ToHashSet(),
        Families = Enum.GetValues<FamilyRule>().ToHashSet(),
        Intervals = Enum.GetValues<IntervalKind>().ToHashSet(),
        Contrasts = Enum.GetValues<VisitContrast>().ToHashSet(),
        Keys = StudyKeys.Optional.ToHashSet(),
    };

    /// <summary>What is available in a kind of design: its own keys and intervals count as those of every design.</summary>
    public Capabilities For(DesignKind design) =>
        this with
        {
            Keys = Keys.Concat(KeysOfDesign.TryGetValue(design, out var keys) ? keys : []).ToHashSet(),
            Intervals = Intervals.Concat(IntervalsOfDesign.TryGetValue(design, out var intervals) ? intervals : []).ToHashSet(),
        };

    /// <summary>The methods for a kind of endpoint in a kind of design; empty where there are none.</summary>
    public IReadOnlyList<string> MethodsFor(DesignKind design, EndpointKind endpoint) =>
        Methods.TryGetValue((design, endpoint), out var names) ? names : [];

    private static Dictionary<(DesignKind Design, EndpointKind Endpoint), IReadOnlyList<string>> ByDesignAndEndpoint(
        Func<DesignKind, EndpointKind, IReadOnlyList<string>> names)
    {
        var table = new Dictionary<(DesignKind, EndpointKind), IReadOnlyList<string>>();
        foreach (DesignKind design in Enum.GetValues<DesignKind>())
        {
            foreach (EndpointKind endpoint in Enum.GetValues<EndpointKind>())
            {
                if (names(design, endpoint) is { Count: > 0 } some)
                    table[(design, endpoint)] = some;
            }
        }

        return table;
    }
}
