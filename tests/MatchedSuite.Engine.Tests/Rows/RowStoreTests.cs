using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Tests.Rows;

public sealed class RowStoreTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("matched-rows-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void Rows_come_back_as_they_went_in_and_the_file_is_gone_afterwards()
    {
        using (var store = new RowStore(_folder))
        {
            var rows = new ResultRow[5000];
            for (int i = 0; i < rows.Length; i++)
                rows[i] = new ResultRow { Endpoint = i, Estimate = i / 7.0, P = Probability.FromLog10(-i), Remarks = Remarks.Ties };
            store.Append(rows.AsSpan(0, 3000));
            store.Append(rows.AsSpan(3000));

            int seen = 0;
            store.Scan((int position, in ResultRow row) =>
            {
                Assert.Equal(seen++, position);
                Assert.Equal(rows[position], row);
            });
            Assert.Equal(rows.Length, seen);
            var one = new ResultRow[1];
            store.Read(4321, one);
            Assert.Equal(rows[4321], one[0]);
        }

        Assert.Empty(Directory.EnumerateFileSystemEntries(_folder));
    }
}
