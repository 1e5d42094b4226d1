namespace MatchedSuite.Storage.Values;

/// <summary>Which part of a file of measurements a run wants.</summary>
/// <param name="Samples">Positions in <see cref="EndpointSource.Samples"/>, in the order in which the block's values shall stand.</param>
/// <param name="Wanted">True for the endpoints to load, by name.</param>
/// <param name="EndpointsPerBlock">Upper bound for the endpoints of one block, at least 1.</param>
public sealed record EndpointSelection(int[] Samples, Func<string, bool> Wanted, int EndpointsPerBlock);
