using MatchedSuite.Storage.Values;

namespace MatchedSuite.Storage.Tests.Values;

/// <summary>The four kinds of file tell the same: whatever the layout, the format, the block size, the threads, the memory.</summary>
public sealed class EndpointSourceTests : IDisposable
{
    private static readonly string[] AllKinds = ["endpoint rows", "sample rows", "endpoint rows, Parquet", "sample rows, Parquet"];
    private static readonly HashSet<string> Links = ["pair"];

    private readonly ScratchFolder _folder = new();
    private readonly Matrix _matrix = new(endpoints: 211, samples: 37);

    public void Dispose() => _folder.Dispose();

    private EndpointSource Open(string kind, long memory = 1 << 29) => EndpointSource.Open(kind switch
    {
        "endpoint rows" => new EndpointSourceOptions { Path = MatrixFiles.EndpointRows(_folder, _matrix), Layout = ValueLayout.EndpointRows },
        "sample rows" => new EndpointSourceOptions { Path = MatrixFiles.SampleRows(_folder, _matrix), Layout = ValueLayout.SampleRows, SampleColumn = "sample", OtherColumns = Links },
        "endpoint rows, Parquet" => new EndpointSourceOptions { Path = MatrixFiles.EndpointRowsParquet(_folder, _matrix, 100), Layout = ValueLayout.EndpointRows },
        _ => new EndpointSourceOptions { Path = MatrixFiles.SampleRowsParquet(_folder, _matrix, 20), Layout = ValueLayout.SampleRows, SampleColumn = "sample", OtherColumns = Links },
    } with
    { Memory = memory, ScratchFolder = _folder.File("scratch") });

    [Theory]
    [MemberData(nameof(Combinations))]
    public void All_four_kinds_give_the_same_values_for_any_block_size_threads_and_memory(string kind, int perBlock, int threads, long memory)
    {
        using EndpointSource source = Open(kind, memory);
        Assert.Equal(_matrix.Samples, source.Samples);
        EndpointSelection selection = Matrix.All(source, perBlock);
        _matrix.AssertEqual(Matrix.Load(source, selection, threads), selection.Samples, selection.Wanted);
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Samples_stand_in_the_order_asked_for_and_endpoints_may_be_left_out(string kind)
    {
        using EndpointSource source = Open(kind, memory: 2000);
        var selection = new EndpointSelection([36, 0, 7, 12], name => name.EndsWith('3'), 5);
        _matrix.AssertEqual(Matrix.Load(source, selection, threads: 2), selection.Samples, selection.Wanted);
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void The_blocks_may_be_enumerated_again_with_another_selection(string kind)
    {
        using EndpointSource source = Open(kind, memory: 2000);
        var first = Matrix.All(source, 16);
        var second = new EndpointSelection([3, 2], name => name.Length == 8, 7);
        foreach (EndpointSelection selection in new[] { first, second, first, first with { EndpointsPerBlock = 50 } })
            _matrix.AssertEqual(Matrix.Load(source, selection), selection.Samples, selection.Wanted);
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void No_wanted_endpoint_gives_no_values(string kind)
    {
        using EndpointSource source = Open(kind);
        Assert.Empty(Matrix.Load(source, new EndpointSelection([0, 1], _ => false, 10)));
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Nothing_is_left_in_the_scratch_folder(string kind)
    {
        using (EndpointSource source = Open(kind, memory: 1000))
            Matrix.Load(source, Matrix.All(source, 10));
        string scratch = _folder.File("scratch");
        Assert.True(!Directory.Exists(scratch) || Directory.GetFileSystemEntries(scratch).Length == 0);
    }

    [Theory]
    [InlineData(';', "\r\n", ',')]
    [InlineData('\t', "\n", '.')]
    [InlineData('|', "\r", '.')]
    public void Every_dialect_gives_the_same_values(char delimiter, string lineEnd, char decimalMark)
    {
        string path = MatrixFiles.EndpointRows(_folder, _matrix, delimiter, lineEnd, decimalMark);
        using EndpointSource source = EndpointSource.Open(new EndpointSourceOptions
        {
            Path = path, Layout = ValueLayout.EndpointRows, Dialect = new TextDialect { DecimalMark = decimalMark },
        });
        EndpointSelection selection = Matrix.All(source, 13);
        _matrix.AssertEqual(Matrix.Load(source, selection, threads: 2), selection.Samples, selection.Wanted);
    }

    [Fact]
    public void The_layout_long_is_refused_by_name() =>
        Refused.By(() => EndpointSource.Open(new EndpointSourceOptions { Path = "a/long.csv", Layout = ValueLayout.Long }), "long.csv",
            "the layout 'long' is asked for, which is not available in this version", "'sample-rows' or 'endpoint-rows'");

    [Theory]
    [MemberData(nameof(Kinds))]
    public void A_selection_that_the_file_cannot_fill_is_the_callers_mistake(string kind)
    {
        using EndpointSource source = Open(kind);
        Assert.Throws<ArgumentException>(() => source.Blocks(new EndpointSelection([37], _ => true, 1)));
        Assert.Throws<ArgumentException>(() => source.Blocks(new EndpointSelection([1, 1], _ => true, 1)));
        Assert.Throws<ArgumentOutOfRangeException>(() => source.Blocks(new EndpointSelection([1], _ => true, 0)));
    }

    public static TheoryData<string> Kinds => [.. AllKinds];

    public static TheoryData<string, int, int, long> Combinations
    {
        get
        {
            var all = new TheoryData<string, int, int, long>();
            foreach (string kind in AllKinds)
                foreach (int perBlock in new[] { 1, 64, 1000 })
                    foreach (int threads in new[] { 1, 2 })
                        foreach (long memory in new[] { 1500L, 1L << 29 })
                            all.Add(kind, perBlock, threads, memory);
            return all;
        }
    }
}
