using System.Buffers;

namespace MatchedSuite.Storage.Values;

/// <summary>A strip of neighbouring endpoints of a spool, sample-major, shared by the blocks that are cut from it.</summary>
/// <param name="values">Sample s, endpoint e at s · width + e.</param>
/// <param name="width">Endpoints.</param>
/// <param name="users">Blocks that will be loaded from it; the last gives a lent array back. 0 for a panel that stays.</param>
internal sealed class SpoolPanel(double[] values, int width, int users)
{
    // 64 samples by 8 endpoints: each cache line that is fetched is used whole before it leaves the first-level cache.
    private const int TileSamples = 64;
    private const int TileEndpoints = 8;

    private readonly bool _lent = users > 0;
    private int _users = users;

    /// <summary>Writes endpoints from <paramref name="first"/> on into the block's endpoints, which are already named.</summary>
    public void CopyTo(EndpointBlock target, int first)
    {
        for (int endpoints = 0; endpoints < target.Count; endpoints += TileEndpoints)
        {
            int lastEndpoint = Math.Min(endpoints + TileEndpoints, target.Count);
            for (int samples = 0; samples < target.Samples; samples += TileSamples)
            {
                int count = Math.Min(TileSamples, target.Samples - samples);
                for (int endpoint = endpoints; endpoint < lastEndpoint; endpoint++)
                {
                    Span<double> row = target.Values(endpoint).Slice(samples, count);
                    int source = samples * width + first + endpoint;
                    for (int i = 0; i < row.Length; i++, source += width) row[i] = values[source];
                }
            }
        }
    }

    /// <summary>One block has been loaded.</summary>
    public void Leave()
    {
        if (_lent && Interlocked.Decrement(ref _users) == 0) ArrayPool<double>.Shared.Return(values);
    }
}
