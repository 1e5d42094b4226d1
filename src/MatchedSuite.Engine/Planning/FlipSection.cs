using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Planning;

/// <summary>The values that one contrast and stratum flips or relabels, as a part of an endpoint's row in the store of differences.</summary>
/// <param name="Contrast">Position of the contrast in the plan.</param>
/// <param name="Stratum">Position of the stratum, or <see cref="Rows.ResultRow.AllStrata"/>.</param>
/// <param name="Offset">Where the part begins.</param>
/// <param name="Sets">Its length: the sets that the matching gives, or their members, or the subjects of both arms.</param>
public sealed record FlipSection(short Contrast, short Stratum, int Offset, int Sets)
{
    /// <summary>Who may exchange labels with whom; null where signs are flipped.</summary>
    public RelabelBlocks? Blocks { get; init; }
}
