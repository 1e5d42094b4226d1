using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Running;

/// <summary>The primary result of one endpoint and contrast, as a person reads it.</summary>
/// <param name="Endpoint">What is known of the endpoint.</param>
/// <param name="Contrast">Name of the contrast.</param>
/// <param name="Method">Name of the method.</param>
/// <param name="Row">The numbers.</param>
/// <param name="Adjusted">Adjusted p-values, one an adjustment of the plan.</param>
/// <param name="Rejected">Whether each adjustment rejects.</param>
public sealed record SummaryRow(
    EndpointInfo Endpoint, string Contrast, string Method, ResultRow Row, IReadOnlyList<Probability> Adjusted, IReadOnlyList<bool> Rejected);
