namespace MatchedSuite.Engine.Evaluation;

/// <summary>Recognises strata that are the two kinds of twins, by the field's usual letters.</summary>
public static class TwinStrata
{
    /// <summary>Identical twins.</summary>
    public const string Monozygotic = "MZ";

    /// <summary>Fraternal twins.</summary>
    public const string Dizygotic = "DZ";

    /// <summary>True for the strata DZ and MZ, and no others.</summary>
    public static bool Are(string[] strata) => strata is [Dizygotic, Monozygotic];
}
