using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>The data sets with repeated visits as subjects × visits tables, subject after subject.</summary>
internal sealed record VisitTables(string[] Subjects, double[] Times, double[] Values)
{
    public int Visits => Times.Length;

    /// <summary>Potthoff &amp; Roy (1964): distances in mm of 27 children at ages 8, 10, 12, 14.</summary>
    public static VisitTables Orthodont(IReadOnlySet<int>? droppedRows = null) => Long("orthodont", "subject", "age", "distance", droppedRows);

    /// <summary>Belenky et al. (2003): reaction times in ms of 18 people on days 0 to 9.</summary>
    public static VisitTables SleepStudy() => Long("sleepstudy", "subject", "days", "reaction");

    /// <summary>Wretenberg et al. (1993): effort of 9 people to rise from 4 stools.</summary>
    public static VisitTables ErgoStool() => Long("ergostool", "subject", "type", "effort");

    /// <summary>A data set that is already wide.</summary>
    public static VisitTables Wide(string dataset, params string[] columns)
    {
        var table = Expected.Table(dataset);
        double[][] read = [.. columns.Select(table.Numbers)];
        double[] values = [.. Enumerable.Range(0, table.Rows).SelectMany(row => read.Select(column => column[row]))];
        return new VisitTables([.. Enumerable.Range(1, table.Rows).Select(row => $"{row}")], [.. Enumerable.Range(0, columns.Length).Select(j => (double)j)], values);
    }

    /// <summary>Hollander &amp; Wolfe (1973), p. 140: seconds to round first base, 22 players, three ways.</summary>
    public static VisitTables RoundingTimes() => Wide("rounding_times", "round_out", "narrow_angle", "wide_angle");

    /// <summary>Hollander &amp; Wolfe (1973), p. 147: strength of cotton at falling potash levels.</summary>
    public static VisitTables Cotton() => Wide("cotton_page", "k144", "k108", "k72", "k54", "k36");

    /// <summary>Ratings of three ways of teaching by ten students: the example of SciPy's page on Page's test.</summary>
    public static VisitTables Teaching() => Wide("teaching_page", "tutorial", "lecture", "seminar");

    /// <summary>Tippett (1950): mean breaks of two wools at three tensions.</summary>
    public static VisitTables WarpBreaks() => Long("warpbreaks_means", "wool", "tension", "mean_breaks");

    /// <summary>The sample of these values.</summary>
    public VisitSample Sample() => VisitSample.Of(Values, Times);

    private static VisitTables Long(string dataset, string subject, string visit, string value, IReadOnlySet<int>? droppedRows = null)
    {
        var table = Expected.Table(dataset);
        var (subjects, visits, numbers) = (table.Texts(subject), table.Texts(visit), table.Numbers(value));
        string[] people = [.. subjects.Distinct()], places = [.. visits.Distinct()];
        double[] values = [.. Enumerable.Repeat(double.NaN, people.Length * places.Length)];
        for (int row = 0; row < table.Rows; row++)
        {
            if (droppedRows?.Contains(row + 1) != true)
                values[Array.IndexOf(people, subjects[row]) * places.Length + Array.IndexOf(places, visits[row])] = numbers[row];
        }

        bool numeric = places.All(place => double.TryParse(place, out _));
        double[] times = [.. places.Select((place, j) => numeric ? ReferenceTable.Number(place) : j)];
        return new VisitTables(people, times, values);
    }
}
