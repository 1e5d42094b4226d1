using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>One comparison of visits.</summary>
/// <param name="Name">Its name in the column <c>contrast</c>.</param>
/// <param name="Form">Its form.</param>
/// <param name="Index">Difference: position of the visit that comes first.</param>
/// <param name="Reference">Difference: position of the visit that is subtracted.</param>
public sealed record VisitComparison(string Name, VisitForms Form, int Index, int Reference);
