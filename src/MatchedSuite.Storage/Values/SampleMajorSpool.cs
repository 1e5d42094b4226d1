using System.Buffers;
using System.Runtime.InteropServices;

namespace MatchedSuite.Storage.Values;

/// <summary>Takes values sample by sample and gives them back in blocks of endpoints.</summary>
/// <remarks>
/// The matrix lies in panels of neighbouring endpoints, sample-major within a panel: writing a sample touches each panel
/// once, reading a block needs one panel. Panels are in memory when all fit, else in a <see cref="ScratchFile"/>; then one
/// panel at a time is read. Several threads may write different samples.
/// </remarks>
internal sealed class SampleMajorSpool : IDisposable
{
    private const long LargestPanelBytes = 1 << 24;
    private const int SmallestPanelShare = 16;

    private readonly int _samples;
    private readonly int _endpoints;
    private readonly int _width;
    private readonly double[][]? _resident;
    private readonly ScratchFile? _file;

    /// <param name="samples">Number of samples.</param>
    /// <param name="endpoints">Number of endpoints.</param>
    /// <param name="memory">Bytes that may be held in memory.</param>
    /// <param name="scratchFolder">Folder for the scratch file that is used beyond it.</param>
    public SampleMajorSpool(int samples, int endpoints, long memory, string scratchFolder)
    {
        _samples = samples;
        _endpoints = endpoints;
        long rowBytes = (long)Math.Max(1, samples) * sizeof(double);
        _width = (int)Math.Clamp(Math.Min(LargestPanelBytes, memory / SmallestPanelShare) / rowBytes, 1, Math.Max(1, endpoints));
        // A stride that is a multiple of a large power of two would put a tile's lines into few cache sets.
        if (_width > 64 && _width % 64 == 0) _width -= 8;
        long bytes = rowBytes * endpoints;
        if (bytes <= memory)
            _resident = [.. Panels().Select(panel => GC.AllocateUninitializedArray<double>(Width(panel) * samples))];
        else
            _file = new ScratchFile(scratchFolder, bytes);
    }

    /// <summary>Writes one sample's values of consecutive endpoints.</summary>
    public void Write(int sample, int firstEndpoint, ReadOnlySpan<double> values)
    {
        while (!values.IsEmpty)
        {
            int panel = firstEndpoint / _width, within = firstEndpoint % _width;
            int width = Width(panel);
            int count = Math.Min(width - within, values.Length);
            int at = sample * width + within;
            if (_resident is not null)
                values[..count].CopyTo(_resident[panel].AsSpan(at));
            else
                _file!.Write(Start(panel) + (long)at * sizeof(double), MemoryMarshal.AsBytes(values[..count]));
            values = values[count..];
            firstEndpoint += count;
        }
    }

    /// <summary>The endpoints in order, in blocks of at most <paramref name="perBlock"/>.</summary>
    /// <param name="names">Name of each endpoint.</param>
    /// <param name="perBlock">Most endpoints a block.</param>
    /// <param name="firstNumber">Number of the first block.</param>
    /// <param name="before">Share of the whole input that lies before this spool.</param>
    /// <param name="share">Share of the whole input that this spool holds.</param>
    public IEnumerable<PendingBlock> Blocks(IReadOnlyList<string> names, int perBlock, int firstNumber, double before, double share)
    {
        int number = firstNumber;
        foreach (int panel in Panels())
        {
            int width = Width(panel);
            SpoolPanel strip = Strip(panel, (width + perBlock - 1) / perBlock);
            for (int first = 0; first < width; first += perBlock)
            {
                int count = Math.Min(perBlock, width - first);
                int start = panel * _width + first;
                yield return new Block(strip, names, start, first, count, _samples)
                {
                    Number = number++,
                    Reached = before + share * (start + count) / _endpoints,
                };
            }
        }
    }

    public void Dispose() => _file?.Dispose();

    private IEnumerable<int> Panels() => Enumerable.Range(0, (_endpoints + _width - 1) / _width);

    private int Width(int panel) => Math.Min(_width, _endpoints - panel * _width);

    private long Start(int panel) => (long)panel * _width * _samples * sizeof(double);

    private SpoolPanel Strip(int panel, int users)
    {
        if (_resident is not null) return new SpoolPanel(_resident[panel], Width(panel), users: 0);
        int length = Width(panel) * _samples;
        double[] lent = ArrayPool<double>.Shared.Rent(length);
        _file!.Read(Start(panel), MemoryMarshal.AsBytes(lent.AsSpan(0, length)));
        return new SpoolPanel(lent, Width(panel), users);
    }

    private sealed class Block(SpoolPanel strip, IReadOnlyList<string> names, int start, int first, int count, int samples) : PendingBlock
    {
        public override void Load(EndpointBlock target)
        {
            target.Clear(samples);
            for (int endpoint = 0; endpoint < count; endpoint++) target.Add(names[start + endpoint]);
            strip.CopyTo(target, first);
            strip.Leave();
        }
    }
}
