namespace MatchedSuite.Engine.Planning;

/// <summary>The warning of a covariate that says nothing of its own within sets.</summary>
internal static class CollinearWarning
{
    /// <summary>The sentence.</summary>
    public static string Of(string covariate) =>
        $"covariate '{covariate}' is the same within every set or follows from the others; results are not adjusted for it";
}
