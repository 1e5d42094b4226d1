namespace MatchedSuite.Statistics.Randomness;

/// <summary>What random numbers are drawn for, so that two uses under one seed never share a number.</summary>
/// <remarks>The numbers are part of every seeded result: a member keeps its number for ever, a new one takes the next.</remarks>
public enum RandomPurpose
{
    /// <summary>Sign flips of whole sets; index: the resample, counter: the set.</summary>
    SignFlips = 1,

    /// <summary>Relabelings within sets; index: the resample, counter: the word within it.</summary>
    Relabelings = 2,

    /// <summary>Simulated studies for planning; index: the study, counter: the number within it.</summary>
    Planning = 3,

    /// <summary>Invented data for demonstrations and checks; index: the endpoint, counter: the number within it.</summary>
    Invention = 4,
}
