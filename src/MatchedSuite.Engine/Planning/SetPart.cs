namespace MatchedSuite.Engine.Planning;

/// <summary>The members that enter one row: those of all sets, or of the sets of a stratum.</summary>
/// <param name="Stratum">The row's stratum.</param>
/// <param name="Members">Positions among all members, set after set.</param>
/// <param name="Starts">Where each set starts among them, then their number.</param>
/// <param name="IsIndex">True for a member in the index role.</param>
/// <param name="Covariates">Columns one after another, one value a member; NaN where missing.</param>
public sealed record SetPart(short Stratum, int[] Members, int[] Starts, bool[] IsIndex, double[] Covariates)
{
    /// <summary>Number of sets that the matching gives.</summary>
    public int Sets => Starts.Length - 1;
}
