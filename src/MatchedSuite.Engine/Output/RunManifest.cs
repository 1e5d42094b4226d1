using System.Reflection;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Running;
using MatchedSuite.Storage.Files;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes <c>run.json</c>: what went in, what was asked, what came out; enough to repeat the run.</summary>
/// <remarks>Everything outside the section <c>execution</c> is the same whenever and wherever the run is repeated.</remarks>
internal static class RunManifest
{
    /// <summary>Version of the program, as <c>matched --version</c> prints it.</summary>
    public static string Version { get; } =
        typeof(RunManifest).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion;

    /// <summary>Writes the manifest of a finished run.</summary>
    /// <param name="folder">The folder being filled; the tables are there already.</param>
    /// <param name="run">What was found.</param>
    /// <param name="inputs">The input files with their fingerprints.</param>
    /// <param name="execution">How the run went on this machine.</param>
    public static void Write(RunFolder folder, FinishedRun run, IReadOnlyList<InputRecord> inputs, ExecutionRecord execution)
    {
        using FileStream file = File.Create(folder.PathOf("run.json"));
        using var json = new Utf8JsonWriter(file, new JsonWriterOptions { Indented = true, NewLine = "\n" });
        json.WriteStartObject();
        WriteOrigin(json, run.Plan.Study);
        WriteInputs(json, inputs);
        WriteCounts(json, run);
        WriteAdjustments(json, run);
        WriteGuaranteed(json, run);
        WriteTexts(json, "warnings", run.Warnings);
        WriteTexts(json, "cautions", run.Cautions);
        WriteOutputs(json, folder.Partial);
        execution.Write(json);
        json.WriteEndObject();
    }

    /// <summary>Writes the manifest of an audit, alone or before a gate stopped the run: inputs and broken gates, no results.</summary>
    public static void WriteAuditOnly(
        RunFolder folder, StudyDefinition study, IReadOnlyList<string> gates, IReadOnlyList<InputRecord> inputs, ExecutionRecord execution)
    {
        using FileStream file = File.Create(folder.PathOf("run.json"));
        using var json = new Utf8JsonWriter(file, new JsonWriterOptions { Indented = true, NewLine = "\n" });
        json.WriteStartObject();
        WriteOrigin(json, study);
        WriteInputs(json, inputs);
        WriteTexts(json, "broken_gates", gates);
        WriteOutputs(json, folder.Partial);
        execution.Write(json);
        json.WriteEndObject();
    }

    private static void WriteOrigin(Utf8JsonWriter json, StudyDefinition study)
    {
        json.WriteNumber("manifest", 1);
        json.WriteStartObject("program");
        json.WriteString("name", "matched");
        json.WriteString("version", Version);
        json.WriteEndObject();
        json.WriteStartObject("study");
        json.WriteString("name", study.Name);
        json.WriteString("file", Path.GetFileName(study.Path));
        json.WriteString("sha256", Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(study.Text))));
        json.WriteString("text", study.Text);
        json.WriteEndObject();
        json.WriteNumber("seed", study.Seed);
    }

    private static void WriteInputs(Utf8JsonWriter json, IReadOnlyList<InputRecord> inputs)
    {
        json.WriteStartArray("inputs");
        foreach (InputRecord input in inputs)
        {
            json.WriteStartObject();
            json.WriteString("part", input.Part);
            json.WriteString("file", input.Path);
            json.WriteNumber("bytes", input.Fingerprint.Bytes);
            json.WriteString("sha256", input.Fingerprint.Sha256);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void WriteCounts(Utf8JsonWriter json, FinishedRun run)
    {
        json.WriteStartObject("counts");
        json.WriteNumber("sample_rows", run.Audit.Dispositions.Length);
        json.WriteNumber("samples_used", run.Plan.Arrangement.Rows.Length);
        json.WriteNumber("sets", run.Plan.Arrangement.Sets.Length);
        json.WriteNumber("endpoints", run.Endpoints);
        json.WriteNumber("primary_rows", run.PrimaryRows);
        json.WriteNumber("tested", run.TestedRows);
        json.WriteEndObject();
    }

    private static void WriteAdjustments(Utf8JsonWriter json, FinishedRun run)
    {
        json.WriteStartArray("hypotheses");
        foreach (HypothesisGroup group in run.Groups)
        {
            json.WriteStartObject();
            json.WriteString("contrast", run.Plan.ContrastName(group.Contrast));
            json.WriteString("stratum", run.Plan.StratumName(group.Stratum));
            json.WriteString("method", group.Method == HypothesisGroup.PrimaryMethods ? "primary" : run.Plan.MethodNames[group.Method]);
            if (group.Family is { } family)
                json.WriteString("family", family);
            json.WriteNumber("m", group.Hypotheses);
            json.WriteStartObject("rejected");
            for (int i = 0; i < group.Rejected.Length; i++)
            {
                if (group.Rejected[i] is { } rejected)
                    json.WriteNumber(run.Plan.Adjustments[i].Name, rejected);
            }

            json.WriteEndObject();
            WriteWhole(json, group);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    private static void WriteGuaranteed(Utf8JsonWriter json, FinishedRun run)
    {
        json.WriteStartArray("true_discoveries");
        foreach (GuaranteedDiscoveries whole in run.Guaranteed)
        {
            json.WriteStartObject();
            json.WriteString("contrast", run.Plan.ContrastName(whole.Contrast));
            json.WriteString("stratum", run.Plan.StratumName(whole.Stratum));
            json.WriteNumber("m", whole.Tested);
            json.WriteNumber("at_least", whole.AtLeast);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }

    // What is said of a group as a whole; a number that does not exist is left out.
    private static void WriteWhole(Utf8JsonWriter json, HypothesisGroup group)
    {
        if (group.Hypotheses > 0)
        {
            json.WriteNumber("true_null_share", group.TrueNullShare);
            json.WriteNumber("simes_p", group.SimesP.Value);
        }

        if (group.Flips.Count == 0)
            return;
        json.WriteStartObject("resampling");
        foreach (FlipFacts flips in group.Flips)
        {
            json.WriteStartObject(flips.Adjustment);
            json.WriteNumber("flips", flips.Flips);
            json.WriteBoolean("all_flips", flips.Exhaustive);
            if (double.IsFinite(flips.CriticalValue))
                json.WriteNumber("critical_value", flips.CriticalValue);
            json.WriteEndObject();
        }

        json.WriteEndObject();
    }

    private static void WriteTexts(Utf8JsonWriter json, string name, IReadOnlyList<string> texts)
    {
        json.WriteStartArray(name);
        foreach (string text in texts)
            json.WriteStringValue(text);
        json.WriteEndArray();
    }

    private static void WriteOutputs(Utf8JsonWriter json, string partial)
    {
        json.WriteStartArray("outputs");
        IEnumerable<string> files = Directory.EnumerateFiles(partial, "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(partial, path).Replace('\\', '/'))
            .Where(path => path != "run.json")
            .Order(StringComparer.Ordinal);
        foreach (string path in files)
        {
            FileFingerprint print = FileFingerprint.Of(Path.Combine(partial, path));
            json.WriteStartObject();
            json.WriteString("file", path);
            json.WriteNumber("bytes", print.Bytes);
            json.WriteString("sha256", print.Sha256);
            json.WriteEndObject();
        }

        json.WriteEndArray();
    }
}
