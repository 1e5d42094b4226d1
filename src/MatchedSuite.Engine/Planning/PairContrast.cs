using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>One comparison of two places within every set.</summary>
/// <param name="Name">Its name in the column <c>contrast</c>.</param>
/// <param name="Index">The place whose values come first in the difference.</param>
/// <param name="Reference">The place that is subtracted.</param>
/// <param name="Columns">What is known of each set beside the endpoint.</param>
public sealed record PairContrast(string Name, Place Index, Place Reference, PairColumns Columns)
{
    /// <summary>The contrast of a study with two roles.</summary>
    public const string IndexReference = "index-reference";

    /// <summary>The contrast of a study with a measured exposure: the slope.</summary>
    public const string PerUnit = "per-unit";
}
