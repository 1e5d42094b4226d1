using System.Text.Json;
using System.Text.Json.Nodes;
using Json.Schema;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests.Definition;

/// <summary>The published schema and the reader accept the same study files and know the same keys.</summary>
public class SchemaAgreementTests
{
    private static readonly string SchemaText = File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Published", "study.schema.json"));
    private static readonly JsonSchema Schema = JsonSchema.FromText(SchemaText);

    public static TheoryData<int> RightChanges => [.. Enumerable.Range(0, SchemaCorpus.Right.Length)];

    public static TheoryData<int> WrongChanges => [.. Enumerable.Range(0, SchemaCorpus.Wrong.Length)];

    [Theory]
    [InlineData(StudyTexts.Pairs)]
    [InlineData(StudyTexts.Sets)]
    [InlineData(StudyTexts.Visits)]
    [InlineData(StudyTexts.ChangeByArm)]
    [InlineData(StudyTexts.Crossover)]
    [InlineData(StudyTexts.Exposure)]
    public void A_full_study_file_of_each_design_is_accepted_by_both(string text)
    {
        Assert.True(SchemaAccepts(text));
        Assert.True(ReaderAccepts(text));
    }

    [Theory]
    [MemberData(nameof(RightChanges))]
    public void A_study_file_with_one_right_change_is_accepted_by_both(int change)
    {
        var (text, passage, replacement) = SchemaCorpus.Right[change];
        string changed = text.With(passage, replacement);
        Assert.True(ReaderAccepts(changed), $"reader: {passage} -> {replacement}");
        Assert.True(SchemaAccepts(changed), $"schema: {passage} -> {replacement}");
    }

    [Theory]
    [MemberData(nameof(WrongChanges))]
    public void A_study_file_with_one_wrong_change_is_refused_by_both(int change)
    {
        var (text, passage, replacement) = SchemaCorpus.Wrong[change];
        string changed = text.With(passage, replacement);
        Assert.False(ReaderAccepts(changed), $"reader: {passage} -> {replacement}");
        Assert.False(SchemaAccepts(changed), $"schema: {passage} -> {replacement}");
    }

    [Fact]
    public void The_schema_and_the_reader_know_the_same_keys()
    {
        var schema = JsonNode.Parse(SchemaText)!.AsObject();
        Assert.Equal(StudyKeys.All.Order(StringComparer.Ordinal), Keys(schema, schema, "").Distinct().Order(StringComparer.Ordinal));
    }

    [Fact]
    public void The_schema_and_the_reader_know_the_same_methods_and_adjustments()
    {
        var analysis = JsonNode.Parse(SchemaText)!["properties"]!["analysis"]!["properties"]!;
        foreach (EndpointKind kind in Enum.GetValues<EndpointKind>())
            Assert.Equal(KnownNames.MethodsFor(kind).Order(), Names(analysis[WrittenName.Of(kind)]!));
        Assert.Equal(KnownNames.Adjustments.Order(), Names(analysis["adjust"]!));
    }

    private static IEnumerable<string> Names(JsonNode list) => list["items"]!["enum"]!.AsArray().Select(name => name!.GetValue<string>()).Order();

    private static IEnumerable<string> Keys(JsonObject root, JsonNode node, string path)
    {
        if (node["$ref"]?.GetValue<string>() is { } reference)
            node = root["$defs"]![reference["#/$defs/".Length..]]!;
        if (node["items"] is { } items)
        {
            foreach (string key in Keys(root, items, path + "[]"))
                yield return key;
        }

        foreach (var (name, inner) in node["properties"]?.AsObject() ?? [])
        {
            string key = path.Length == 0 ? name : $"{path}.{name}";
            yield return key;
            foreach (string deeper in Keys(root, inner!, key))
                yield return deeper;
        }
    }

    private static bool SchemaAccepts(string text) =>
        Schema.Evaluate(JsonSerializer.SerializeToElement(YamlAsJson.Convert(text))).IsValid;

    private static bool ReaderAccepts(string text)
    {
        try
        {
            StudyFolder.Read(text);
            return true;
        }
        catch (RefusalException)
        {
            return false;
        }
    }
}
