using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The differences of the endpoints that are adjusted together, as the resampling procedures read them.</summary>
/// <param name="store">The differences of all endpoints.</param>
/// <param name="section">The part of the group's contrast and stratum.</param>
/// <param name="endpoints">Positions of the group's endpoints in the data, in the order of its hypotheses.</param>
internal sealed class GroupDifferences(DifferenceStore store, FlipSection section, int[] endpoints) : IDifferenceStore
{
    /// <inheritdoc/>
    public int Endpoints => endpoints.Length;

    /// <inheritdoc/>
    public int Sets => section.Sets;

    /// <inheritdoc/>
    public void Read(int first, int count, Span<double> destination)
    {
        for (int i = 0; i < count; i++)
            store.Read(endpoints[first + i], section.Offset, destination.Slice(i * Sets, Sets));
    }
}
