using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Methods;

/// <summary>A procedure over the differences themselves: common sign flips of whole sets.</summary>
public delegate ResamplingResult ResamplingProcedure(IDifferenceStore store, ResamplingOptions options, CancellationToken cancellation);

/// <summary>A procedure over values whose labels are exchanged within blocks.</summary>
public delegate ResamplingResult RelabelingProcedure(
    IDifferenceStore values, RelabelBlocks blocks, ResamplingOptions options, CancellationToken cancellation);

/// <summary>An adjustment that needs every endpoint's differences, or its values and their labels; it controls the family-wise error rate.</summary>
/// <param name="Name">Its name in the study file.</param>
/// <param name="Procedure">The procedure itself.</param>
public sealed record ResamplingAdjustment(string Name, ResamplingProcedure Procedure) : Adjustment(Name, ErrorRate.FamilyWise)
{
    /// <summary>The same where labels are exchanged instead of signs; null where it has no such form.</summary>
    public RelabelingProcedure? OverLabels { get; init; }
}
