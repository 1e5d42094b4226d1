using MatchedSuite.Engine.Adjusting;

namespace MatchedSuite.Engine.Tests.Adjusting;

public sealed class DifferenceStoreTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("matched-differences-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Theory]
    [InlineData(long.MaxValue, false)]
    [InlineData(3_000_000, true)]
    [InlineData(0, true)]
    public void What_was_appended_is_read_wherever_it_lies(long memory, bool onDisk)
    {
        const int Width = 37;
        const int Rows = 20_000;
        using (var store = new DifferenceStore(Width, memory, _folder))
        {
            for (int first = 0; first < Rows; first += 1_250)
                store.Append([.. Enumerable.Range(first * Width, 1_250 * Width).Select(Value)]);
            Assert.Equal((Rows, onDisk), (store.Count, store.IsOnDisk));
            var part = new double[11];
            foreach (int row in (int[])[0, 1, 3_541, 3_542, 10_000, Rows - 1])
            {
                store.Read(row, 5, part);
                Assert.Equal(Enumerable.Range((row * Width) + 5, part.Length).Select(Value), part);
            }
        }

        Assert.Empty(Directory.EnumerateFileSystemEntries(_folder));
    }

    private static double Value(int position) => position % 17 == 0 ? double.NaN : position / 3.0;
}
