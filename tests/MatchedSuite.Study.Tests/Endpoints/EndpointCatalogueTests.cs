using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Study.Tests.Endpoints;

/// <summary>The dictionary describes endpoints, the study file chooses them; what is wrong in either is said with its line.</summary>
public class EndpointCatalogueTests
{
    private const string Dictionary = """
        endpoint,label,kind,unit,transform,detection_limit,family,weight,primary
        crp,C-reactive protein,continuous,mg/L,log2,0.2,inflammation,2,yes
        smoker,Smokes,binary,,,,habits,,no
        pain,,ordinal,,,,,,
        il6,Interleukin 6,,pg/mL,none,,inflammation,0.5,
        """;

    [Fact]
    public void An_entry_says_all_it_says_and_takes_the_rest_from_the_study_file()
    {
        EndpointCatalogue catalogue = Read(Dictionary, "transform: log");
        Assert.Equal(
            new EndpointInfo { Name = "crp", Label = "C-reactive protein", Kind = EndpointKind.Continuous, Unit = "mg/L", Transform = Transform.Log2, DetectionLimit = 0.2, Family = "inflammation", Weight = 2, Primary = true, Place = 0 },
            catalogue.Describe("crp"));
        Assert.Equal(new EndpointInfo { Name = "smoker", Label = "Smokes", Kind = EndpointKind.Binary, Family = "habits", Place = 1 }, catalogue.Describe("smoker"));
        Assert.Equal(new EndpointInfo { Name = "pain", Kind = EndpointKind.Ordinal, Family = "all", Weight = 1, Place = 2 }, catalogue.Describe("pain"));
        Assert.Equal((Transform.None, 0.5), (catalogue.Describe("il6").Transform, catalogue.Describe("il6").Weight));
    }

    [Fact]
    public void An_endpoint_without_an_entry_has_the_defaults_of_the_study_file()
    {
        Assert.Equal(new EndpointInfo { Name = "tnf", Kind = EndpointKind.Continuous, Transform = Transform.Log, Place = int.MaxValue }, Read(Dictionary, "transform: log").Describe("tnf"));
        Assert.Equal(new EndpointInfo { Name = "tnf", Kind = EndpointKind.Binary }, Read(null, "kind: binary, transform: log").Describe("tnf"));
    }

    [Theory]
    [InlineData("endpoint,lable\ncrp,x\n", "endpoints.csv, header: the column 'lable' is not known", "Did you mean 'label'?")]
    [InlineData("name,label\ncrp,x\n", "the column 'name' is not known")]
    [InlineData("label,unit\ncrp,x\n", "there is no column 'endpoint'")]
    [InlineData("endpoint,kind\ncrp,continous\n", "endpoints.csv, line 2, column 'kind': 'continous' is not known", "Did you mean 'continuous'?")]
    [InlineData("endpoint,transform\ncrp,\nil6,ln\n", "line 3, column 'transform': 'ln' is not known")]
    [InlineData("endpoint,kind,transform\ncrp,binary,log\n", "a binary endpoint has the transform 'log'")]
    [InlineData("endpoint\ncrp\nil6\ncrp\n", "endpoints.csv, line 4, column 'endpoint'", "the endpoint 'crp' is already on endpoints.csv, line 2")]
    [InlineData("endpoint,label\n,x\n", "line 2, column 'endpoint': the endpoint has no name")]
    [InlineData("endpoint,detection_limit\ncrp,low\n", "'low' is not a number", "above 0")]
    [InlineData("endpoint,detection_limit\ncrp,0\n", "0 is not allowed here", "above 0")]
    [InlineData("endpoint,weight\ncrp,-1\n", "-1 is not allowed here", "0 or more")]
    [InlineData("endpoint,primary\ncrp,perhaps\n", "'perhaps' is neither yes nor no")]
    public void What_is_wrong_in_the_dictionary_is_refused_with_its_place(string dictionary, params string[] pieces)
    {
        string message = Assert.Throws<RefusalException>(() => Read(dictionary)).Message;
        Assert.All(pieces, piece => Assert.Contains(piece, message, StringComparison.Ordinal));
    }

    [Fact]
    public void What_the_version_cannot_do_is_refused_in_the_dictionary_too()
    {
        Capabilities some = Capabilities.Everything with
        {
            Transforms = new HashSet<Transform> { Transform.None, Transform.Log },
            Keys = new HashSet<string>(),
            DefaultMethods = new Dictionary<(DesignKind, EndpointKind), IReadOnlyList<string>> { [(DesignKind.Sets, EndpointKind.Continuous)] = ["conditional-logistic"] },
        };
        Assert.Contains("'sqrt' is not available in this version. Expected one of what is available: 'none', 'log'", Refusal("endpoint,transform\ncrp,sqrt\n", some), StringComparison.Ordinal);
        Assert.Contains("detection limits are not available in this version", Refusal("endpoint,detection_limit\ncrp,1\n", some), StringComparison.Ordinal);
        Assert.Contains("no method for binary endpoints", Refusal("endpoint,kind\ncrp,binary\n", some), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("crp", true)]
    [InlineData("crp_high", true)]
    [InlineData("crp_old", false)]
    [InlineData("CRP", false)]
    [InlineData("il6", true)]
    [InlineData("il66", false)]
    [InlineData("a_mid_z", true)]
    [InlineData("a_mid_zz", false)]
    public void Patterns_choose_endpoints(string name, bool wanted)
    {
        Assert.Equal(wanted, Read(null, "include: [\"crp*\", il6, \"a*mid*z\"], exclude: [\"*_old\", \"*zz\"]").Wanted(name));
    }

    [Theory]
    [InlineData("*", "", true)]
    [InlineData("*", "anything", true)]
    [InlineData("a*a", "a", false)]
    [InlineData("a*a", "aa", true)]
    [InlineData("**x**", "axb", true)]
    [InlineData("ab*bc", "abc", false)]
    [InlineData("*ab*ab*", "ab-ab", true)]
    [InlineData("*ab*ab*", "ab", false)]
    [InlineData("x.y", "xzy", false)]
    public void A_star_stands_for_any_letters_also_none(string pattern, string name, bool fits) =>
        Assert.Equal(fits, new NamePattern(pattern).Matches(name));

    [Fact]
    public void What_is_named_and_never_met_is_said()
    {
        EndpointCatalogue catalogue = Read(Dictionary, "include: [\"*\", crpp, \"x*\"], exclude: [pain, pian]");
        string[] data = ["crp", "smoker", "pain", "tnf"];
        string[] wanted = [.. data.Where(catalogue.Wanted)];
        Assert.Equal(
            [
                "endpoints.csv: 1 endpoint is not in the data: 'il6'.",
                "endpoints.include: 'crpp' fits no endpoint that is wanted. Did you mean 'crp'?",
                "endpoints.include: 'x*' fits no endpoint that is wanted.",
                "endpoints.exclude: 'pian' leaves out nothing.",
            ],
            catalogue.Unmet(wanted));
        Assert.Empty(Read(null).Unmet(["crp"]));
    }

    [Fact]
    public void Entries_that_are_not_wanted_are_said_before_any_data_are_read()
    {
        Assert.Equal(["endpoints.csv: 3 endpoints are outside endpoints.include: 'smoker', 'pain', 'il6'."], Read(Dictionary, "include: [crp]").Warnings);
        Assert.Empty(Read(Dictionary).Warnings);
    }

    private static string Refusal(string dictionary, Capabilities capabilities) =>
        Assert.Throws<RefusalException>(() => Read(dictionary, "", capabilities)).Message;

    private static EndpointCatalogue Read(string? dictionary, string keys = "") => Read(dictionary, keys, Capabilities.Everything);

    private static EndpointCatalogue Read(string? dictionary, string keys, Capabilities capabilities)
    {
        using var folder = new StudyFolder();
        if (dictionary is not null)
            folder.Write("endpoints.csv", dictionary);
        string all = string.Join(", ", new[] { dictionary is null ? "" : "dictionary: endpoints.csv", keys }.Where(part => part.Length > 0));
        string study = folder.Write("study.yaml", StudyTexts.Sets.With("  reuse: allowed", "") + $"\nendpoints: {{{all}}}\n");
        return EndpointCatalogue.Read(StudyReader.Read(study, capabilities));
    }
}
