namespace MatchedSuite.Storage.Values;

/// <summary>How the measurements lie in their file.</summary>
public enum ValueLayout
{
    /// <summary>One row a sample, one column an endpoint.</summary>
    SampleRows,

    /// <summary>One row an endpoint, one column a sample.</summary>
    EndpointRows,

    /// <summary>One row a measurement: sample, endpoint, value.</summary>
    Long,
}
