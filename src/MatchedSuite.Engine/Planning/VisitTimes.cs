using System.Globalization;

namespace MatchedSuite.Engine.Planning;

/// <summary>The times of visits that a slope refers to.</summary>
internal static class VisitTimes
{
    /// <summary>The visits' own names where all are numbers that rise; else 0, 1, 2, … so that a slope is per visit.</summary>
    public static double[] Of(IReadOnlyList<string> visits)
    {
        double[] times = [.. visits.Select(visit => double.TryParse(visit, NumberStyles.Float, CultureInfo.InvariantCulture, out double time) ? time : double.NaN)];
        bool rise = times.All(double.IsFinite) && times.Zip(times.Skip(1)).All(pair => pair.First < pair.Second);
        return rise ? times : [.. Enumerable.Range(0, visits.Count).Select(visit => (double)visit)];
    }
}
