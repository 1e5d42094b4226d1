using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>One invented marker and the truth about it.</summary>
/// <param name="Name">Name in the panel.</param>
/// <param name="Label">Label in the dictionary.</param>
/// <param name="Kind">Kind of endpoint.</param>
/// <param name="Unit">Unit; empty for signs and scores.</param>
/// <param name="Transform">Transform in the dictionary.</param>
/// <param name="Family">Family in the dictionary.</param>
/// <param name="Effect">Planted effect of the index role, in within-pair standard deviations of the latent scale; 0 for none.</param>
internal sealed record InventedMarker(
    string Name, string Label, EndpointKind Kind, string Unit, Transform Transform, string Family, double Effect);
