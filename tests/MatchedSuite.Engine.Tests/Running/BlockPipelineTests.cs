using MatchedSuite.Engine.Running;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Tests.Running;

public class BlockPipelineTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(8)]
    public void Blocks_are_committed_in_order_whatever_the_threads(int threads)
    {
        var committed = new List<string>();
        Run(InventedBlocks(200), new Worker(failing: []), committed, threads);
        Assert.Equal(Enumerable.Range(0, 200).Select(number => $"e{number}"), committed);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(8)]
    public void The_earliest_failing_block_is_the_error_whatever_the_threads(int threads)
    {
        for (int round = 0; round < 20; round++)
        {
            var committed = new List<string>();
            var error = Assert.Throws<InvalidOperationException>(
                () => Run(InventedBlocks(200), new Worker(failing: [31, 32, 33, 150]), committed, threads));
            Assert.Equal("block 31", error.Message);
            Assert.True(committed.Count <= 31);
        }
    }

    [Fact]
    public void A_failure_to_read_on_waits_for_the_blocks_before_it()
    {
        var committed = new List<string>();
        var error = Assert.Throws<InvalidOperationException>(
            () => Run(InventedBlocks(200, readFailure: 40), new Worker(failing: [39]), committed, threads: 4));
        Assert.Equal("block 39", error.Message);
    }

    [Fact]
    public void A_cancelled_run_throws_and_commits_no_more()
    {
        using var cancellation = new CancellationTokenSource();
        var committed = new List<string>();
        using var pipeline = new BlockPipeline(
            InventedBlocks(200), () => new Worker(failing: []),
            block =>
            {
                committed.AddRange(block.Names);
                if (committed.Count == 10)
                    cancellation.Cancel();
            },
            threads: 2);
        Assert.Throws<OperationCanceledException>(() => pipeline.Run(cancellation.Token));
        Assert.InRange(committed.Count, 10, 30);
    }

    private static void Run(IEnumerable<PendingBlock> blocks, Worker worker, List<string> committed, int threads)
    {
        using var pipeline = new BlockPipeline(blocks, () => worker, block => committed.AddRange(block.Names), threads);
        pipeline.Run(CancellationToken.None);
    }

    private static IEnumerable<PendingBlock> InventedBlocks(int count, int readFailure = -1)
    {
        for (int number = 0; number < count; number++)
        {
            if (number == readFailure)
                throw new InvalidOperationException("reading");
            yield return new InventedBlock { Number = number, Reached = (number + 1.0) / count };
        }
    }

    private sealed class InventedBlock : PendingBlock
    {
        public override void Load(EndpointBlock target)
        {
            target.Clear(samples: 1);
            target.Add($"e{Number}")[0] = Number;
        }
    }

    private sealed class Worker(int[] failing) : IBlockWorker
    {
        public void Work(EndpointBlock block, BlockResult result)
        {
            int number = (int)block.Values(0)[0];
            Thread.SpinWait(number % 7 * 5_000);
            if (failing.Contains(number))
                throw new InvalidOperationException($"block {number}");
            result.Names.Add(block.Names[0]);
        }
    }
}
