using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The invented study of repeated visits: beginners in a choir seen four times over a season, 120 markers of mixed kinds.</summary>
/// <remarks>
/// Everything is invented. A singer keeps most of a marker's level from visit to visit, markers of a family move together, a cold
/// raises some of them. Effects are planted (<c>truth.csv</c> says which): some rise over the season, some jump by week 4 and stay.
/// The sheet has the blemishes that real ones have: visits that were missed, a singer seen once, a sample taken on a wrong day, one
/// taken twice, one without a visit.
/// </remarks>
public static class VisitDemo
{
    private const int Singers = 90;
    private const double MissingShare = 0.03;
    private const double DetectionLimit = 4;
    private const long SheetStream = 5_000_000;
    private const long FactorStream = 6_000_000;
    private const int SeenOnce = 17;
    private const int SeenTwiceInWeek4 = 33;
    private const int WrongDay = 48;
    private const int VisitLost = 71;
    private static readonly string[] SheetColumns = ["sample", "singer", "visit", "day", "voice", "cold"];
    private static readonly string[] Visits = ["start", "week4", "week12", "week30"];
    private static readonly int[] Days = [0, 28, 84, 210];

    /// <summary>Writes samples, panel, dictionary, truth and the study file into a folder that exists.</summary>
    /// <returns>Path of the study file.</returns>
    public static string Write(string folder, long seed = 20261203)
    {
        var numbers = new InventedNumbers(seed);
        InventedMarker[] markers = Markers();
        Sample[] seen = [.. Enumerable.Range(0, Singers).SelectMany(singer => SamplesOf(singer, numbers))];
        Sample again = new(SeenTwiceInWeek4, 1);
        string[] names = [.. seen.Select(NameOf), NameOf(again) + "-again"];
        Sample[] columns = [.. seen, again];
        DemoTables.Write(Path.Combine(folder, "samples.csv"), SheetColumns, [.. columns.Select((sample, column) => SheetRow(sample, names[column], numbers))]);
        DemoTables.WritePanel(Path.Combine(folder, "panel.csv"), markers, names, (marker, column) => Cell(markers[marker], marker, columns[column], numbers));
        DemoTables.WriteDictionary(
            Path.Combine(folder, "markers.csv"), markers, marker => marker.Name is "sal-09" or "sal-20" ? DetectionLimit.ToString(CultureInfo.InvariantCulture) : "");
        DemoTables.WriteTruth(Path.Combine(folder, "truth.csv"), markers);
        return DemoStudyFile.Write("visits", folder);
    }

    private static InventedMarker[] Markers() =>
    [
        .. DemoTables.Range(70, i => new InventedMarker(
            $"sal-{i:00}", $"saliva protein {i:00}", EndpointKind.Continuous, "mg/L", Transform.Log2, "saliva", i % 10 == 3 ? (i % 20 == 3 ? 1 : -1) * (0.35 + 0.004 * i) : 0)),
        .. DemoTables.Range(25, i => new InventedMarker(
            $"breath-{i:00}", $"breathing measure {i:00}", EndpointKind.Continuous, "L/s", Transform.None, "breathing", i is 2 or 11 ? 0.7 : i is 18 ? -0.45 : 0)),
        .. DemoTables.Range(13, i => new InventedMarker(
            $"sign-{i:00}", $"hoarseness sign {i:00}", EndpointKind.Binary, "", Transform.None, "signs", i is 5 ? -1.2 : 0)),
        .. DemoTables.Range(12, i => new InventedMarker(
            $"mood-{i:00}", $"mood score {i:00}", EndpointKind.Ordinal, "", Transform.None, "mood", i is 1 or 8 ? 0.8 : 0)),
    ];

    // The season's share of a planted effect: by the number in its name some markers rise steadily, the others jump by week 4.
    private static double ShareReached(int marker, int visit) => marker % 2 == 0 ? Days[visit] / (double)Days[^1] : visit > 0 ? 1 : 0;

    private static IEnumerable<Sample> SamplesOf(int singer, InventedNumbers numbers) =>
        Enumerable.Range(0, Visits.Length)
            .Where(visit => singer == SeenOnce ? visit == 0 : visit == 0 || numbers.Uniform(SheetStream + visit, singer) > 0.07)
            .Select(visit => new Sample(singer, visit));

    private static string NameOf(Sample sample) => string.Create(CultureInfo.InvariantCulture, $"CH{sample.Singer + 1:000}-{Visits[sample.Visit]}");

    private static string?[] SheetRow(Sample sample, string name, InventedNumbers numbers)
    {
        int late = sample.Visit == 0 ? 0 : (int)(12 * numbers.Uniform(SheetStream + 10 + sample.Visit, sample.Singer)) - 6;
        bool isWrong = sample is { Singer: WrongDay, Visit: 2 };
        bool isLost = sample is { Singer: VisitLost, Visit: 3 };
        return
        [
            name,
            string.Create(CultureInfo.InvariantCulture, $"CH{sample.Singer + 1:000}"),
            isLost ? null : Visits[sample.Visit],
            (Days[sample.Visit] + late + (isWrong ? 40 : 0)).ToString(CultureInfo.InvariantCulture),
            sample.Singer % 5 < 3 ? "high" : "low",
            HasCold(sample, numbers) ? "1" : "0",
        ];
    }

    private static bool HasCold(Sample sample, InventedNumbers numbers) => numbers.Uniform(SheetStream + 20 + sample.Visit, sample.Singer) < 0.15;

    private static string? Cell(InventedMarker marker, int stream, Sample sample, InventedNumbers numbers)
    {
        double missing = marker.Name == "sal-44" ? 0.65 : MissingShare;
        if (numbers.Uniform(FactorStream + 100 + stream, sample.Key) < missing)
            return null;
        double latent = Latent(marker, stream, sample, numbers);
        return marker.Kind switch
        {
            EndpointKind.Binary => marker.Name == "sign-13" || latent < 0.4 ? "0" : "1",
            EndpointKind.Ordinal => Math.Clamp((int)Math.Floor(latent + 2), 0, 5).ToString(CultureInfo.InvariantCulture),
            _ => DemoTables.Rounded(marker.Transform == Transform.Log2 ? 15 * Math.Pow(2, 0.6 * latent) : 6 + 0.7 * latent),
        };
    }

    // The singer's level, a factor shared by the family's markers, the day's own part, a cold, and the planted effect so far.
    private static double Latent(InventedMarker marker, int stream, Sample sample, InventedNumbers numbers)
    {
        double level = 0.9 * numbers.Normal(FactorStream + 300 + stream, sample.Singer);
        double factor = 0.35 * numbers.Normal(FactorStream + marker.Family.Length, sample.Key);
        double own = 0.6 * numbers.Normal(FactorStream + 600 + stream, sample.Key);
        double cold = HasCold(sample, numbers) && stream % 3 == 0 ? 0.5 : 0;
        return level + factor + own + cold + marker.Effect * ShareReached(stream, sample.Visit);
    }

    /// <summary>One singer at one visit.</summary>
    private readonly record struct Sample(int Singer, int Visit)
    {
        public long Key => 4L * Singer + Visit;
    }
}
