namespace MatchedSuite.Storage.Tables;

/// <summary>Where rows of a table go: a Parquet file, a delimited text file.</summary>
public interface ITableSink : IDisposable
{
    /// <summary>Writes the filled rows of a batch.</summary>
    void Write(TableBatch batch);

    /// <summary>Ends the table; without it the file is not valid. Disposing alone does not complete.</summary>
    void Complete();
}
