namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>What is compared between endpoints when whole sets are flipped.</summary>
public enum FlipStatistic
{
    /// <summary>The paired t of each endpoint through its own number of sets. A set whose difference is 0 counts; NaN does not.</summary>
    T,

    /// <summary>
    /// The signed sum over its standard deviation under the flips, Σd/√Σd². With <see cref="Pairs.SignedRankScores"/> as differences it is the signed-rank
    /// test (Wilcoxon: zeros are given rank 0 and drop out; Pratt: their ranks are left out of the others' sum).
    /// </summary>
    Score,
}
