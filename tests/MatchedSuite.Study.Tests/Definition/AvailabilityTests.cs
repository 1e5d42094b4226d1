using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests.Definition;

/// <summary>What a version cannot do is refused with the list of what it can; extending the capabilities is enough to allow it.</summary>
public class AvailabilityTests
{
    private static readonly Capabilities PairsOnly = new()
    {
        Designs = new HashSet<DesignKind> { DesignKind.Pairs },
        Layouts = new HashSet<ValueLayout> { ValueLayout.SampleRows, ValueLayout.EndpointRows },
        Methods = new Dictionary<(DesignKind, EndpointKind), IReadOnlyList<string>>
        {
            [(DesignKind.Pairs, EndpointKind.Continuous)] = ["paired-t", "signed-rank", "sign"],
            [(DesignKind.Pairs, EndpointKind.Binary)] = ["mcnemar-exact"],
        },
        DefaultMethods = new Dictionary<(DesignKind, EndpointKind), IReadOnlyList<string>>
        {
            [(DesignKind.Pairs, EndpointKind.Continuous)] = ["paired-t"],
            [(DesignKind.Pairs, EndpointKind.Binary)] = ["mcnemar-exact"],
        },
        Adjustments = ["bonferroni", "holm", "bh"],
        Transforms = new HashSet<Transform> { Transform.None, Transform.Log2 },
        Families = new HashSet<FamilyRule> { FamilyRule.All },
    };

    private const string Plain = """
        schema: 1
        study: {name: Plain}
        data: {samples: samples.csv}
        design:
          kind: pairs
          set: pair
          role: {column: role, index: a, reference: b}
        endpoints: {kind: continuous, scale: none}
        analysis: {zeros: drop, across: none, sensitivity: {gamma: false}}
        """;

    [Fact]
    public void Values_that_ask_for_nothing_are_always_allowed()
    {
        AnalysisSection analysis = StudyFolder.Read(Plain, PairsOnly).Analysis;
        Assert.Equal(["paired-t"], analysis.Methods[EndpointKind.Continuous]);
        Assert.Equal([EndpointKind.Continuous, EndpointKind.Binary], analysis.Methods.Keys);
    }

    [Theory]
    [InlineData("kind: pairs", "kind: sets", "key 'design.kind': 'sets' is not available in this version", "'pairs'")]
    [InlineData("samples: samples.csv", "samples: samples.csv, sample: s, values: v.csv, layout: long, endpoint: e, value: v", "'long' is not available in this version", "'sample-rows', 'endpoint-rows'")]
    [InlineData("zeros: drop", "continuous: [sign-flip]", "key 'analysis.continuous': 'sign-flip' is not available in this version", "'paired-t', 'signed-rank', 'sign'")]
    [InlineData("zeros: drop", "count: [paired-poisson]", "'paired-poisson' is not available in this version", "nothing is available for it")]
    [InlineData("zeros: drop", "adjust: [hommel]", "'hommel' is not available in this version", "'bonferroni', 'holm', 'bh'")]
    [InlineData("zeros: drop", "family: by-family", "'by-family' is not available in this version", "'all'")]
    [InlineData("zeros: drop", "zeros: pratt", "'analysis.zeros' is not available in this version", "Remove the key.")]
    [InlineData("zeros: drop", "intervals: [fcr]", "'analysis.intervals' is not available in this version")]
    [InlineData("zeros: drop", "equivalence: {margin: 1}", "'analysis.equivalence' is not available in this version")]
    [InlineData("gamma: false", "gamma: true", "'analysis.sensitivity' is not available in this version")]
    [InlineData("scale: none", "scale: sd", "'endpoints.scale' is not available in this version")]
    [InlineData("scale: none", "below-limit: half", "'endpoints.below-limit' is not available in this version")]
    [InlineData("scale: none", "transform: sqrt", "'sqrt' is not available in this version", "'none', 'log2'")]
    [InlineData("kind: continuous", "kind: ordinal", "no method for ordinal endpoints in this design is available", "'continuous', 'binary'")]
    [InlineData("set: pair\n", "set: pair\n  stratum: zone\n", "'design.stratum' is not available in this version")]
    [InlineData("set: pair\n", "set: pair\n  covariates: [age]\n", "'design.covariates' is not available in this version")]
    [InlineData("set: pair\n", "set: pair\n  person-time: years\n", "'design.person-time' is not available in this version")]
    [InlineData("role: {column: role, index: a, reference: b}", "exposure: {column: hours}", "'design.exposure' is not available in this version")]
    public void What_is_not_available_is_refused_with_what_is(string passage, string replacement, params string[] pieces)
    {
        string message = StudyFolder.Refusal(Plain.With(passage, replacement), PairsOnly).Message;
        Assert.All(pieces, piece => Assert.Contains(piece, message, StringComparison.Ordinal));
        Assert.Equal("Plain", StudyFolder.Read(Plain.With(passage, replacement), Capabilities.Everything).Name);
    }

    [Fact]
    public void Optional_keys_that_are_available_are_listed()
    {
        Capabilities some = PairsOnly with { Keys = new HashSet<string> { "design.stratum" } };
        Assert.Equal("zone", StudyFolder.Read(Plain.With("set: pair\n", "set: pair\n  stratum: zone\n"), some).Design.Stratum);
        Assert.Contains("this version has 'design.stratum'", StudyFolder.Refusal(Plain.With("zeros: drop", "zeros: pratt"), some).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_key_may_be_available_in_one_kind_of_design_alone()
    {
        Capabilities some = Capabilities.Everything with
        {
            Keys = new HashSet<string>(),
            KeysOfDesign = new Dictionary<DesignKind, IReadOnlyList<string>> { [DesignKind.Sets] = ["endpoints.scale"] },
        };
        string scaled = Plain.With("scale: none", "scale: sd");
        string message = StudyFolder.Refusal(scaled, some).Message;
        Assert.Contains("'endpoints.scale' is not available in this version for this kind of design, only for 'sets'", message, StringComparison.Ordinal);
        Assert.True(StudyFolder.Read(scaled.With("kind: pairs", "kind: sets"), some).Endpoints.PerStandardDeviation);
    }

    [Fact]
    public void An_interval_may_be_available_in_one_kind_of_design_alone()
    {
        Capabilities some = Capabilities.Everything with
        {
            Intervals = new HashSet<IntervalKind> { IntervalKind.Fcr },
            IntervalsOfDesign = new Dictionary<DesignKind, IReadOnlyList<IntervalKind>> { [DesignKind.Sets] = [IntervalKind.Profile] },
        };
        string profile = Plain.With("zeros: drop", "intervals: [fcr, profile]");
        Assert.Contains("'profile' is not available in this version", StudyFolder.Refusal(profile, some).Message, StringComparison.Ordinal);
        Assert.Equal([IntervalKind.Fcr], StudyFolder.Read(profile.With("kind: pairs", "kind: sets"), some).Analysis.IntervalsOverEndpoints);
    }

    [Fact]
    public void A_name_that_is_not_known_at_all_is_not_called_unavailable()
    {
        string message = StudyFolder.Refusal(Plain.With("zeros: drop", "continuous: [sing]"), PairsOnly).Message;
        Assert.Contains("the method 'sing' is not known", message, StringComparison.Ordinal);
        Assert.Contains("Did you mean 'sign'?", message, StringComparison.Ordinal);
    }
}
