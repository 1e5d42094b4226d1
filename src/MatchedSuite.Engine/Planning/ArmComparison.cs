namespace MatchedSuite.Engine.Planning;

/// <summary>One follow-up visit with the reference visit: compared between arms, and within each.</summary>
/// <param name="BetweenArms">Position in the plan of the contrast between arms.</param>
/// <param name="FollowUp">Position of the follow-up visit.</param>
/// <param name="WithinArms">The two visits, for the methods for pairs.</param>
public sealed record ArmComparison(short BetweenArms, int FollowUp, PairContrast WithinArms)
{
    /// <summary>Position in the plan of the contrast within arms.</summary>
    public short Within => (short)(BetweenArms + 1);
}
