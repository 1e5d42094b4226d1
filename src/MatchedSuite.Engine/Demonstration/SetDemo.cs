using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The invented matched case-control study: bakers with asthma and one to three colleagues each, 150 markers of mixed kinds.</summary>
/// <remarks>
/// Everything is invented. Blood was stored at hiring; controls worked in the same bakery, are of the same sex and about the same
/// age. Members of a set share part of their level, markers of a family move together. Effects are planted (<c>truth.csv</c> says
/// which), and the sheet has the blemishes that real ones have: a set without a case, a case without a control, a control who serves
/// two cases, a sample measured twice, a wrong age, a sample that was never measured.
/// </remarks>
public static class SetDemo
{
    private const int Sets = 124;
    private const double MissingShare = 0.02;
    private const double DetectionLimit = 5;
    private const long SheetStream = 3_000_000;
    private const long FactorStream = 4_000_000;
    private const int WithoutCase = 30;
    private const int WithoutControl = 45;
    private const int WithWrongAge = 61;
    private const int WithUnknownSmoker = 52;
    private const int WithUnmeasured = 92;
    private const int Lending = 76;
    private const int Borrowing = 77;
    private const int MeasuredTwice = 15;
    private static readonly string[] SheetColumns = ["sample", "risk_set", "person", "status", "bakery", "sex", "age", "smoking", "bmi"];

    /// <summary>Writes samples, panel, dictionary, truth and the study file into a folder that exists.</summary>
    /// <returns>Path of the study file.</returns>
    public static string Write(string folder, long seed = 20261202)
    {
        var numbers = new InventedNumbers(seed);
        InventedMarker[] markers = Markers();
        Member[] members = [.. Enumerable.Range(0, Sets).SelectMany(MembersOf)];
        Member[] measured = [.. members.Where(member => member is not { Set: WithUnmeasured, Place: 2 })];
        Member again = members.Single(member => member is { Set: MeasuredTwice, Place: 1 });
        var sheet = members.Select(member => SheetRow(member, member.Set, NameOf(member), numbers)).ToList();
        sheet.Add(SheetRow(again, again.Set, NameOf(again) + "-again", numbers));
        sheet.Add(SheetRow(new Member(Lending, 1), Borrowing, NameOf(new Member(Lending, 1)), numbers));
        Member[] columns = [.. measured, again];
        DemoTables.Write(Path.Combine(folder, "samples.csv"), SheetColumns, sheet);
        DemoTables.WritePanel(
            Path.Combine(folder, "panel.csv"), markers, [.. measured.Select(NameOf), NameOf(again) + "-again"],
            (marker, sample) => Cell(markers[marker], marker, columns[sample], numbers));
        DemoTables.WriteDictionary(Path.Combine(folder, "markers.csv"), markers, marker => marker.Name is "ige-07" or "ige-11" ? DetectionLimit.ToString(CultureInfo.InvariantCulture) : "");
        DemoTables.WriteTruth(Path.Combine(folder, "truth.csv"), markers);
        return DemoStudyFile.Write("sets", folder);
    }

    private static InventedMarker[] Markers() =>
    [
        .. DemoTables.Range(95, i => new InventedMarker(
            $"cyt-{i:000}", $"cytokine {i:000}", EndpointKind.Continuous, "ng/L", Transform.Log2, "cytokines", i % 11 == 4 ? (i % 22 == 4 ? 1 : -1) * (0.3 + 0.004 * i) : 0)),
        .. DemoTables.Range(25, i => new InventedMarker(
            $"ige-{i:00}", $"specific IgE {i:00}", EndpointKind.Continuous, "kU/L", Transform.None, "antibodies", i is 3 or 7 or 19 ? 0.6 : 0)),
        .. DemoTables.Range(14, i => new InventedMarker(
            $"prick-{i:00}", $"prick test {i:00} positive", EndpointKind.Binary, "", Transform.None, "signs", i is 2 or 9 ? 0.9 : i is 13 ? 9 : 0)),
        .. DemoTables.Range(10, i => new InventedMarker(
            $"score-{i:00}", $"airway score {i:00}", EndpointKind.Ordinal, "", Transform.None, "scores", i is 4 ? 0.7 : 0)),
        .. DemoTables.Range(6, i => new InventedMarker(
            $"visits-{i}", $"visits for complaint {i}", EndpointKind.Count, "", Transform.None, "visits", i is 2 ? 0.8 : 0)),
    ];

    // One case, then one to three controls.
    private static IEnumerable<Member> MembersOf(int set) => Enumerable.Range(0, 2 + set % 3).Select(place => new Member(set, place));

    private static string NameOf(Member member) => string.Create(CultureInfo.InvariantCulture, $"BK{member.Set + 1:000}{(char)('a' + member.Place)}");

    private static string?[] SheetRow(Member member, int set, string name, InventedNumbers numbers)
    {
        // The set that borrows a control is as old as the set it borrows from.
        int matched = member.Set == Borrowing ? Lending : member.Set;
        bool lost = member is { Set: WithoutCase, Place: 0 };
        bool alone = member is { Set: WithoutControl, Place: 1 };
        int age = 22 + (int)(38 * numbers.Uniform(SheetStream, matched)) + (int)(2 * numbers.Uniform(SheetStream + 1, member.Key))
            + (member is { Set: WithWrongAge, Place: 1 } ? 20 : 0);
        return
        [
            name,
            alone ? null : string.Create(CultureInfo.InvariantCulture, $"S{set + 1:000}"),
            NameOf(member),
            lost ? null : member.Place == 0 ? "case" : "control",
            matched % 4 == 1 ? "village" : "factory",
            numbers.Uniform(SheetStream + 2, matched) < 0.4 ? "f" : "m",
            age.ToString(CultureInfo.InvariantCulture),
            member is { Set: WithUnknownSmoker, Place: 2 } ? null : numbers.Uniform(SheetStream + 3, member.Key) < 0.3 ? "yes" : "no",
            DemoTables.Rounded(26 + 3.5 * numbers.Normal(SheetStream + 4, member.Key)),
        ];
    }

    private static string? Cell(InventedMarker marker, int stream, Member member, InventedNumbers numbers)
    {
        double missing = marker.Name == "cyt-050" ? 0.7 : MissingShare;
        if (numbers.Uniform(FactorStream + 100 + stream, member.Key) < missing)
            return null;
        double latent = Latent(marker, stream, member, numbers);
        return marker.Kind switch
        {
            // One test is positive in cases alone.
            EndpointKind.Binary when marker.Name == "prick-13" => member.Place == 0 && latent > 8.4 ? "1" : "0",
            EndpointKind.Binary => marker.Name == "prick-14" || latent < 0.4 ? "0" : "1",
            EndpointKind.Ordinal => Math.Clamp((int)Math.Floor(latent + 1.5), 0, 4).ToString(CultureInfo.InvariantCulture),
            EndpointKind.Count => Math.Max(0, (int)Math.Floor(Math.Exp(0.5 + 0.6 * latent))).ToString(CultureInfo.InvariantCulture),
            _ when marker.Name == "cyt-088" && member.Set is 14 or 87 => "0",
            _ => DemoTables.Rounded(marker.Transform == Transform.Log2 ? 20 * Math.Pow(2, 0.6 * latent) : 5 + 0.8 * latent),
        };
    }

    // Level shared by the set, a factor shared by the family's markers, the person's own part, and the planted effect.
    private static double Latent(InventedMarker marker, int stream, Member member, InventedNumbers numbers)
    {
        double shared = 0.5 * numbers.Normal(FactorStream + 200 + stream, member.Set);
        double factor = 0.5 * numbers.Normal(FactorStream + marker.Family.Length, member.Key);
        double own = 0.75 * numbers.Normal(FactorStream + 400 + stream, member.Key);
        return shared + factor + own + (member.Place == 0 ? marker.Effect : 0);
    }

    /// <summary>One person of a set: place 0 is the case.</summary>
    private readonly record struct Member(int Set, int Place)
    {
        public long Key => 4L * Set + Place;
    }
}
