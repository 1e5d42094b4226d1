namespace MatchedSuite.Storage.Values;

/// <summary>Where each sample of a file stands in the blocks of a selection.</summary>
internal static class SamplePlaces
{
    /// <summary>For each sample of the file its place among the selected, or -1.</summary>
    /// <exception cref="ArgumentException">The selection names a sample that is not there, or one twice, or allows no endpoint a block.</exception>
    public static int[] Of(EndpointSelection selection, int samples)
    {
        ArgumentNullException.ThrowIfNull(selection);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(selection.EndpointsPerBlock);
        int[] places = new int[samples];
        Array.Fill(places, -1);
        for (int place = 0; place < selection.Samples.Length; place++)
        {
            int sample = selection.Samples[place];
            if (sample < 0 || sample >= samples || places[sample] >= 0)
                throw new ArgumentException($"Sample {sample} is not one of {samples}, or is selected twice.", nameof(selection));
            places[sample] = place;
        }
        return places;
    }
}
