namespace MatchedSuite.Storage.Values;

/// <summary>What must be known to open a file of measurements.</summary>
public sealed record EndpointSourceOptions
{
    /// <summary>The file; its name decides the format: <c>.parquet</c>, else delimited text.</summary>
    public required string Path { get; init; }

    /// <summary>How the file is laid out.</summary>
    public required ValueLayout Layout { get; init; }

    /// <summary>Sample rows: the column with the sample names; null when rows have no name (they are then called by their number, from 1).</summary>
    public string? SampleColumn { get; init; }

    /// <summary>Endpoint rows: the column with the endpoint names; null takes the first.</summary>
    public string? EndpointColumn { get; init; }

    /// <summary>Columns that are no endpoints (links, roles, covariates), in sample rows.</summary>
    public IReadOnlySet<string> OtherColumns { get; init; } = new HashSet<string>();

    /// <summary>How delimited text is written.</summary>
    public TextDialect Dialect { get; init; } = TextDialect.Usual;

    /// <summary>Bytes that may be held in memory for reordering; beyond it a scratch file is used.</summary>
    public long Memory { get; init; } = 1L << 29;

    /// <summary>Folder for scratch files, which are deleted when the source is disposed.</summary>
    public string ScratchFolder { get; init; } = System.IO.Path.GetTempPath();

    /// <summary>Threads that may parse while sample rows in delimited text are reordered; the values do not depend on it.</summary>
    public int Threads { get; init; } = Environment.ProcessorCount;
}
