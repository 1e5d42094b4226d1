namespace MatchedSuite.Statistics.Crossover;

/// <summary>Which treatment a subject had first.</summary>
public enum TreatmentSequence
{
    /// <summary>The index treatment in period 1, the reference in period 2.</summary>
    IndexFirst,

    /// <summary>The reference treatment in period 1, the index in period 2.</summary>
    ReferenceFirst,
}
