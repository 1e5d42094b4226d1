namespace MatchedSuite.Engine.Planning;

/// <summary>The members that enter one row: those of all sets, or of the sets of a stratum.</summary>
/// <param name="Stratum">The row's stratum.</param>
/// <param name="Members">Positions among all members, set after set.</param>
/// <param name="Starts">Where each set starts among them, then their number.</param>
/// <param name="IsIndex">True for a member in the index role.</param>
/// <param name="Covariates">Columns one after another, one value a member; NaN where missing.</param>
public sealed record SetPart(short Stratum, int[] Members, int[] Starts, bool[] IsIndex, double[] Covariates)
{
    /// <summary>How many members of each set have the index role; they lie first.</summary>
    public int[] IndexCounts { get; } = [.. Enumerable.Range(0, Starts.Length - 1).Select(set => IsIndex.AsSpan(Starts[set]..Starts[set + 1]).Count(true))];

    /// <summary>True where no covariate of any member is missing.</summary>
    public bool CovariatesKnown { get; } = !Array.Exists(Covariates, double.IsNaN);

    /// <summary>Number of sets that the matching gives.</summary>
    public int Sets => Starts.Length - 1;
}
