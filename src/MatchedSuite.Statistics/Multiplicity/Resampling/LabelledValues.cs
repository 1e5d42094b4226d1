namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Values of members as differences whose signs labels decide: centred in their block, positive for index, negative for reference.</summary>
/// <remarks>
/// Centred values of a block sum to zero, so the sum over its index members is minus that over its reference members, and the sum of all
/// differences is 2U, U = Σ over index members of (x − block mean). Another labelling changes the sign of each member whose label
/// changes. A missing value is put at the mean of the block's present members and adds nothing.
/// </remarks>
internal sealed class LabelledValues(IDifferenceStore values, RelabelBlocks blocks) : IDifferenceStore
{
    /// <inheritdoc/>
    public int Endpoints => values.Endpoints;

    /// <inheritdoc/>
    public int Sets => values.Sets;

    /// <inheritdoc/>
    public void Read(int first, int count, Span<double> destination)
    {
        values.Read(first, count, destination);
        for (int endpoint = 0; endpoint < count; endpoint++)
        {
            for (int block = 0; block < blocks.Count; block++)
            {
                int start = blocks.Starts[block];
                int size = blocks.Size(block);
                Centre(destination.Slice(endpoint * Sets + start, size), blocks.IsIndex.Slice(start, size), blocks.Fewer(block) > 0);
            }
        }
    }

    // Taken from the smallest value, which loses nothing where values are alike: a block without spread gives zeros.
    private static void Centre(Span<double> members, ReadOnlySpan<bool> isIndex, bool exchangeable)
    {
        double smallest = double.PositiveInfinity;
        int present = 0;
        foreach (double value in members)
        {
            if (double.IsNaN(value))
                continue;
            smallest = Math.Min(smallest, value);
            present++;
        }

        if (present == 0 || !exchangeable)
        {
            members.Clear();
            return;
        }

        double sum = 0;
        foreach (double value in members)
            sum += double.IsNaN(value) ? 0 : value - smallest;
        double mean = sum / present;
        for (int i = 0; i < members.Length; i++)
        {
            double centred = double.IsNaN(members[i]) ? 0 : members[i] - smallest - mean;
            members[i] = isIndex[i] ? centred : -centred;
        }
    }
}
