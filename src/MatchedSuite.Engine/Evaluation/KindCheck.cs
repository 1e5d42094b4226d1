using System.Globalization;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Refuses values that an endpoint of its kind cannot have.</summary>
internal static class KindCheck
{
    /// <summary>Checks one endpoint's values, in the order of the arrangement's rows.</summary>
    public static void Run(ReadOnlySpan<double> values, EndpointInfo endpoint, AnalysisPlan plan)
    {
        if (endpoint.Kind is EndpointKind.Continuous or EndpointKind.Ordinal)
            return;
        for (int i = 0; i < values.Length; i++)
        {
            if (!double.IsNaN(values[i]) && !Fits(values[i], endpoint.Kind))
                throw Refusal(values[i], endpoint, plan.SampleName(i), plan.ValuesFile);
        }
    }

    private static bool Fits(double value, EndpointKind kind) => kind switch
    {
        EndpointKind.Binary => value is 0 or 1,
        _ => value >= 0 && value == Math.Floor(value),
    };

    private static RefusalException Refusal(double value, EndpointInfo endpoint, string sample, string file) => new(
        $"{file}, endpoint '{endpoint.Name}', sample '{sample}'",
        $"{value.ToString(CultureInfo.InvariantCulture)} is no value of a {WrittenName.Of(endpoint.Kind)} endpoint",
        endpoint.Kind switch
        {
            EndpointKind.Binary => "0 (no), 1 (yes) or a missing mark",
            _ => "a whole number of events, 0 or more, or a missing mark",
        },
        "Correct the value, or give the endpoint another kind in the dictionary or in endpoints.kind.");
}
