using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The invented twin study: pairs of twins of whom one works in glasshouses, 210 markers of mixed kinds.</summary>
/// <remarks>
/// Everything is invented. Markers of a family move together through a shared factor; twins share most of their level. Some
/// effects are planted (<c>truth.csv</c> says which), some values are missing, and the sample sheet has the blemishes that
/// real ones have: a twin without a partner, a sample measured twice, an empty role, a wrong age.
/// </remarks>
public static class TwinDemo
{
    private const int Pairs = 104;
    private const int Samples = 2 * Pairs;
    private const double MissingShare = 0.03;
    private const double DetectionLimit = 9;
    private const long SheetStream = 1_000_000;
    private const long FactorStream = 2_000_000;
    private const int MeasuredTwice = 20;
    private static readonly string[] SheetColumns =
        ["sample", "pair", "person", "glasshouse", "zygosity", "sex", "age", "bmi", "smoking", "months"];

    /// <summary>Writes samples, panel, dictionary, truth and the study file into a folder that exists.</summary>
    /// <returns>Path of the study file.</returns>
    public static string Write(string folder, long seed = 20261201)
    {
        var numbers = new InventedNumbers(seed);
        InventedMarker[] markers = Markers();
        string[] samples = [.. Enumerable.Range(0, Samples).Select(SampleName), SampleName(MeasuredTwice) + "-again"];
        DemoTables.Write(Path.Combine(folder, "samples.csv"), SheetColumns, [.. samples.Select((name, sample) => SheetRow(PersonOf(sample), name, numbers))]);
        DemoTables.WritePanel(Path.Combine(folder, "panel.csv"), markers, samples, (marker, sample) => Cell(markers[marker], marker, PersonOf(sample), numbers));
        DemoTables.WriteDictionary(Path.Combine(folder, "markers.csv"), markers, LimitOf);
        DemoTables.WriteTruth(Path.Combine(folder, "truth.csv"), markers);
        return DemoStudyFile.Write("twins", folder);
    }

    private static InventedMarker[] Markers() =>
    [
        .. DemoTables.Range(140, i => new InventedMarker(
            $"prot-{i:000}", $"protein {i:000}", EndpointKind.Continuous, "µg/L", Transform.Log2, "proteins", ProteinEffect(i))),
        .. DemoTables.Range(30, i => new InventedMarker(
            $"met-{i:00}", $"metabolite {i:00}", EndpointKind.Continuous, "mmol/L", Transform.None, "metabolites", i is 4 or 17 ? 0.55 : i is 22 ? -0.5 : 0)),
        .. DemoTables.Range(18, i => new InventedMarker(
            $"sign-{i:00}", $"antibody {i:00} present", EndpointKind.Binary, "", Transform.None, "signs", i is 3 or 11 ? 1.1 : 0)),
        .. DemoTables.Range(12, i => new InventedMarker(
            $"score-{i:00}", $"symptom score {i:00}", EndpointKind.Ordinal, "", Transform.None, "symptoms", i is 6 ? 0.7 : 0)),
        .. DemoTables.Range(10, i => new InventedMarker(
            $"spells-{i:00}", $"spells of complaint {i:00}", EndpointKind.Count, "", Transform.None, "spells", i is 2 ? 0.9 : 0)),
    ];

    // Twelve proteins differ, some up and some down, from hardly to plainly visible.
    private static double ProteinEffect(int protein) => protein % 12 == 5 ? (protein % 24 == 5 ? 1 : -1) * (0.3 + 0.05 * (protein / 12)) : 0;

    // The last sample is the second one of a person.
    private static int PersonOf(int sample) => sample < Samples ? sample : MeasuredTwice;

    private static string SampleName(int sample) => string.Create(CultureInfo.InvariantCulture, $"GT{sample / 2 + 1:000}{(sample % 2 == 0 ? 'a' : 'b')}");

    // The first twin of a pair works in glasshouses in every other pair, as a coin decides.
    private static bool IsIndex(int sample, InventedNumbers numbers) =>
        (sample % 2 == 0) == (numbers.Uniform(SheetStream, sample / 2) < 0.5);

    private static string?[] SheetRow(int sample, string name, InventedNumbers numbers)
    {
        int pair = sample / 2;
        bool orphan = sample == 61;
        bool roleLost = sample == 98;
        int age = 24 + (int)(44 * numbers.Uniform(SheetStream + 1, pair)) + (sample == 133 ? 11 : 0);
        bool female = numbers.Uniform(SheetStream + 2, pair) < 0.55;
        return
        [
            name,
            orphan ? null : string.Create(CultureInfo.InvariantCulture, $"P{pair + 1:000}"),
            SampleName(sample),
            roleLost ? null : IsIndex(sample, numbers) ? "yes" : "no",
            pair % 5 < 2 ? "MZ" : "DZ",
            female ? "f" : "m",
            age.ToString(CultureInfo.InvariantCulture),
            BodyMassIndex(sample, numbers),
            numbers.Uniform(SheetStream + 3, sample) < 0.25 ? "yes" : "no",
            (12 + (int)(24 * numbers.Uniform(SheetStream + 4, sample))).ToString(CultureInfo.InvariantCulture),
        ];
    }

    private static string? BodyMassIndex(int sample, InventedNumbers numbers) => sample == 150
        ? null
        : DemoTables.Rounded(25 + 3 * numbers.Normal(SheetStream + 5, sample / 2) + 1.5 * numbers.Normal(SheetStream + 6, sample));

    private static string? Cell(InventedMarker marker, int stream, int sample, InventedNumbers numbers)
    {
        double missing = marker.Name == "prot-077" ? 0.6 : MissingShare;
        if (numbers.Uniform(stream, 5000 + sample) < missing)
            return null;
        double latent = Latent(marker, stream, sample, numbers);
        return marker.Kind switch
        {
            EndpointKind.Binary => marker.Name == "sign-18" || latent < 0.4 ? "0" : "1",
            EndpointKind.Count => Math.Max(0, (int)Math.Floor(Math.Exp(0.7 + 0.6 * latent))).ToString(CultureInfo.InvariantCulture),
            EndpointKind.Ordinal => Math.Clamp((int)Math.Floor(latent + 1.5), 0, 4).ToString(CultureInfo.InvariantCulture),
            _ when marker.Name == "prot-120" && sample is 14 or 87 => "0",
            _ => DemoTables.Rounded(marker.Transform == Transform.Log2 ? 12 * Math.Pow(2, 0.6 * latent) : 4 + 0.35 * latent),
        };
    }

    // Level shared by the twins, a factor shared by the family's markers, the person's own part, and the planted effect.
    private static double Latent(InventedMarker marker, int stream, int sample, InventedNumbers numbers)
    {
        double shared = 0.8 * numbers.Normal(stream, sample / 2);
        double factor = 0.45 * numbers.Normal(FactorStream + marker.Family.Length, sample);
        double own = 0.55 * numbers.Normal(stream, 1000 + sample);
        double effect = IsIndex(sample, numbers) ? marker.Effect : 0;
        return shared + factor + own + effect;
    }

    // A few proteins have a limit in the middle of their values, one a limit above most of them.
    private static string LimitOf(InventedMarker marker) => marker.Name switch
    {
        "prot-012" or "prot-046" or "prot-081" => DetectionLimit.ToString(CultureInfo.InvariantCulture),
        "prot-100" => (2 * DetectionLimit).ToString(CultureInfo.InvariantCulture),
        _ => "",
    };
}
