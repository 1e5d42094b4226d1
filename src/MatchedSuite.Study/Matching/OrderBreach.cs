namespace MatchedSuite.Study.Matching;

/// <summary>A visit that was not after the one before it.</summary>
/// <param name="Subject">Name of the subject.</param>
/// <param name="Earlier">Visit that should be earlier.</param>
/// <param name="EarlierDay">Its last day.</param>
/// <param name="Later">Visit that should be later.</param>
/// <param name="LaterDay">Its first day.</param>
public sealed record OrderBreach(string Subject, string Earlier, double EarlierDay, string Later, double LaterDay);
