using CsCheck;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

/// <summary>A random subjects × visits table for laws.</summary>
internal sealed record VisitTable(int Visits, double[] Values)
{
    public int Subjects => Values.Length / Visits;

    /// <summary>Complete tables of finely graded values around subject levels; eighths and 1024ths, so that laws of scale hold to the bit.</summary>
    public static Gen<VisitTable> Complete(int fewestSubjects, int mostSubjects, int fewestVisits, int mostVisits) =>
        from visits in Gen.Int[fewestVisits, mostVisits]
        from subjects in Gen.Int[fewestSubjects, mostSubjects]
        from levels in Gen.Int[-24, 24].Array[subjects]
        from noise in Gen.Int[-1024, 1024].Array[subjects * visits]
        select new VisitTable(visits, [.. noise.Select((value, at) => levels[at / visits] / 8.0 + value / 1024.0 + 0.25 * (at % visits))]);

    /// <summary>Complete tables of few distinct values: many ties.</summary>
    public static Gen<VisitTable> Coarse(int fewestSubjects, int mostSubjects, int fewestVisits, int mostVisits) =>
        from visits in Gen.Int[fewestVisits, mostVisits]
        from subjects in Gen.Int[fewestSubjects, mostSubjects]
        from values in Gen.Int[0, 3].Array[subjects * visits]
        select new VisitTable(visits, [.. values.Select(value => value / 10.0)]);

    /// <summary>Tables in which about one value in six is missing.</summary>
    public static Gen<VisitTable> Gappy(int fewestSubjects, int mostSubjects, int fewestVisits, int mostVisits) =>
        from table in Complete(fewestSubjects, mostSubjects, fewestVisits, mostVisits)
        from gaps in Gen.Int[0, 5].Array[table.Values.Length]
        select table with { Values = [.. table.Values.Select((value, at) => gaps[at] == 0 ? double.NaN : value)] };

    public VisitSample Sample() => VisitSample.Of(Values, Enumerable.Range(0, Visits).Select(j => (double)j).ToArray());

    public VisitTable Map(Func<double, double> change) => this with { Values = [.. Values.Select(change)] };

    /// <summary>Subjects from last to first.</summary>
    public VisitTable SubjectsReversed() =>
        this with { Values = [.. Values.Chunk(Visits).Reverse().SelectMany(row => row)] };

    /// <summary>Visits from last to first.</summary>
    public VisitTable VisitsReversed() =>
        this with { Values = [.. Values.Chunk(Visits).SelectMany(row => row.Reverse())] };

    /// <summary>One visit's values.</summary>
    public double[] Visit(int visit) => [.. Values.Where((_, at) => at % Visits == visit)];
}
