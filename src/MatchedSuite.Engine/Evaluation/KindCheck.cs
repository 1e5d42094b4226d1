using System.Globalization;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Refuses values that an endpoint of its kind cannot have, or that leave the range of doubles once they are squared and summed.</summary>
internal static class KindCheck
{
    private const double LargestSize = 1e100;
    private const double LargestCount = 1e9;

    /// <summary>Checks one endpoint's values, in the order of the arrangement's rows.</summary>
    public static void Run(ReadOnlySpan<double> values, EndpointInfo endpoint, AnalysisPlan plan)
    {
        if (endpoint.Kind == EndpointKind.Count && plan.Arrangement.Places.Any(place => place.HasReplicates))
            throw MeanOfCounts(endpoint);
        for (int i = 0; i < values.Length; i++)
        {
            if (!double.IsNaN(values[i]) && !Fits(values[i], endpoint.Kind))
                throw Refusal(values[i], endpoint, plan.SampleName(i), plan.ValuesFile);
        }
    }

    private static RefusalException MeanOfCounts(EndpointInfo endpoint) => new(
        "design.replicates", $"'mean' would average the events of the count endpoint '{endpoint.Name}'",
        "'first' or 'refuse' in a study with counts", "Or leave the endpoint out, or give it another kind.");

    private static bool Fits(double value, EndpointKind kind) => kind switch
    {
        EndpointKind.Binary => value is 0 or 1,
        EndpointKind.Count => value is >= 0 and <= LargestCount && value == Math.Floor(value),
        _ => Math.Abs(value) <= LargestSize,
    };

    private static RefusalException Refusal(double value, EndpointInfo endpoint, string sample, string file) => new(
        $"{file}, endpoint '{endpoint.Name}', sample '{sample}'",
        $"{value.ToString(CultureInfo.InvariantCulture)} is no value of a {WrittenName.Of(endpoint.Kind)} endpoint",
        endpoint.Kind switch
        {
            EndpointKind.Binary => "0 (no), 1 (yes) or a missing mark",
            EndpointKind.Count => "a whole number of events from 0 to 1e9, or a missing mark",
            _ => "a number between -1e100 and 1e100, or a missing mark",
        },
        "Correct the value, change its unit, or give the endpoint another kind in the dictionary or in endpoints.kind.");
}
