using System.Globalization;
using BenchmarkDotNet.Attributes;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Benchmarks;

/// <summary>Reading a file of measurements, block by block: nanoseconds a value (50 ns are 20 million values a second).</summary>
/// <remarks>Invented values of seven characters; the file is in the page cache after the first pass.</remarks>
[ShortRunJob]
[MemoryDiagnoser]
public class ReadBench
{
    private const int Endpoints = 10_000;
    private const int Samples = 400;
    private const int Values = Endpoints * Samples;

    private readonly string _folder = Directory.CreateTempSubdirectory("read-bench-").FullName;
    private readonly EndpointBlock[] _blocks = [.. Enumerable.Range(0, Environment.ProcessorCount).Select(_ => new EndpointBlock())];

    [GlobalSetup]
    public void Write()
    {
        var random = new Random(1);
        double[][] matrix = [.. Enumerable.Range(0, Endpoints).Select(_ =>
            Enumerable.Range(0, Samples).Select(_ => random.Next(100_000, 1_000_000) / 10_000.0).ToArray())];
        WriteText("panel.csv", "marker", Endpoints, Samples, (endpoint, sample) => matrix[endpoint][sample]);
        WriteText("samples.csv", "sample", Samples, Endpoints, (sample, endpoint) => matrix[endpoint][sample]);
        WriteParquet("panel.parquet", "marker", Endpoints, Samples, (endpoint, sample) => matrix[endpoint][sample]);
        WriteParquet("samples.parquet", "sample", Samples, Endpoints, (sample, endpoint) => matrix[endpoint][sample]);
    }

    [GlobalCleanup]
    public void Delete() => Directory.Delete(_folder, recursive: true);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Endpoint_rows_text_one_thread() => Read("panel.csv", ValueLayout.EndpointRows, 1);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Endpoint_rows_text_two_threads() => Read("panel.csv", ValueLayout.EndpointRows, 2);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Sample_rows_text_one_thread() => Read("samples.csv", ValueLayout.SampleRows, 1);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Sample_rows_text_by_scratch_file() => Read("samples.csv", ValueLayout.SampleRows, 1, memory: 1 << 22);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Endpoint_rows_Parquet_one_thread() => Read("panel.parquet", ValueLayout.EndpointRows, 1);

    [Benchmark(OperationsPerInvoke = Values)]
    public double Sample_rows_Parquet_one_thread() => Read("samples.parquet", ValueLayout.SampleRows, 1);

    private double Read(string name, ValueLayout layout, int threads, long memory = 1 << 29)
    {
        using EndpointSource source = EndpointSource.Open(new EndpointSourceOptions
        {
            Path = Path.Combine(_folder, name),
            Layout = layout,
            SampleColumn = layout == ValueLayout.SampleRows ? "sample" : null,
            Memory = memory,
            Threads = threads,
        });
        var selection = new EndpointSelection([.. Enumerable.Range(0, source.Samples.Count)], _ => true, 256);
        using IEnumerator<PendingBlock> blocks = source.Blocks(selection).GetEnumerator();
        double sum = 0;
        Parallel.For(0, threads, worker =>
        {
            while (Next(blocks) is { } pending)
            {
                pending.Load(_blocks[worker]);
                if (_blocks[worker].Count > 0) sum = _blocks[worker].Values(0)[0];
            }
        });
        return sum;
    }

    private static PendingBlock? Next(IEnumerator<PendingBlock> blocks)
    {
        lock (blocks) return blocks.MoveNext() ? blocks.Current : null;
    }

    private void WriteText(string name, string corner, int rows, int columns, Func<int, int, double> value)
    {
        using var writer = new StreamWriter(Path.Combine(_folder, name));
        writer.Write(corner);
        for (int column = 0; column < columns; column++) writer.Write(string.Create(CultureInfo.InvariantCulture, $",c{column:00000}"));
        writer.Write('\n');
        for (int row = 0; row < rows; row++)
        {
            writer.Write(string.Create(CultureInfo.InvariantCulture, $"r{row:00000}"));
            for (int column = 0; column < columns; column++) writer.Write(string.Create(CultureInfo.InvariantCulture, $",{value(row, column):00.0000}"));
            writer.Write('\n');
        }
    }

    private void WriteParquet(string name, string corner, int rows, int columns, Func<int, int, double> value)
    {
        TableColumn[] schema = [new TableColumn(corner, ColumnType.Text),
            .. Enumerable.Range(0, columns).Select(column => new TableColumn(string.Create(CultureInfo.InvariantCulture, $"c{column:00000}"), ColumnType.Real))];
        using var sink = new ParquetTableSink(Path.Combine(_folder, name), schema);
        var batch = new TableBatch(schema, Math.Min(rows, 1000));
        for (int first = 0; first < rows; first += batch.Rows)
        {
            batch.Rows = Math.Min(batch.Capacity, rows - first);
            for (int row = 0; row < batch.Rows; row++)
            {
                batch.Text(0)[row] = string.Create(CultureInfo.InvariantCulture, $"r{first + row:00000}");
                for (int column = 0; column < columns; column++) batch.Reals(column + 1)[row] = value(first + row, column);
            }
            sink.Write(batch);
        }
        sink.Complete();
    }
}
