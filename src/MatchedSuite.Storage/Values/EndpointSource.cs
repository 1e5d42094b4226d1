using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Storage.Values;

/// <summary>A file of measurements that can be streamed in blocks of endpoints, whatever its format and layout.</summary>
public abstract class EndpointSource : IDisposable
{
    /// <summary>Opens a file of measurements and reads what its header, or its column of sample names, tells.</summary>
    /// <exception cref="RefusalException">The file cannot be opened or understood, or lacks a column that is asked for.</exception>
    public static EndpointSource Open(EndpointSourceOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        bool parquet = TextTable.IsParquet(options.Path);
        return options.Layout switch
        {
            ValueLayout.EndpointRows => parquet ? new ParquetEndpointRows(options) : new DelimitedEndpointRows(options),
            ValueLayout.SampleRows => parquet ? new ParquetSampleRows(options) : new DelimitedSampleRows(options),
            _ => throw new RefusalException(InputFile.ShortName(options.Path), "the layout 'long' is asked for, which is not available in this version",
                "'sample-rows' or 'endpoint-rows'", "Reshape the table to one row a sample or one row an endpoint."),
        };
    }

    /// <summary>The sample names, in file order. Known from the header alone where samples are columns; else read from the key column.</summary>
    public abstract IReadOnlyList<string> Samples { get; }

    /// <summary>The wanted blocks in file order. May be enumerated more than once; one enumeration at a time.</summary>
    public abstract IEnumerable<PendingBlock> Blocks(EndpointSelection selection);

    /// <summary>Gives back readers and scratch space. Blocks still pending can then no longer be loaded.</summary>
    public abstract void Dispose();
}
