using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Planning;

/// <summary>What is kept of every endpoint for adjustments by sign flips of whole sets.</summary>
/// <param name="Statistic">
/// What endpoints are compared by: the score where every primary method flips scores, else t, which for signed ranks is the t of the
/// ranks and orders the flips of one endpoint as their sum does.
/// </param>
/// <param name="Sections">The parts of an endpoint's row, one a contrast and stratum.</param>
public sealed record FlipPlan(FlipStatistic Statistic, IReadOnlyList<FlipSection> Sections)
{
    /// <summary>Numbers kept of one endpoint.</summary>
    public int Width { get; } = Sections.Sum(section => section.Sets);

    /// <summary>The part of a contrast and stratum; null where nothing is flipped for it.</summary>
    public FlipSection? Section(short contrast, short stratum)
    {
        foreach (FlipSection section in Sections)
        {
            if (section.Contrast == contrast && section.Stratum == stratum)
                return section;
        }

        return null;
    }

    /// <summary>The parts of a design whose contrasts all have the same sets: all of them, then those of each stratum.</summary>
    internal static IReadOnlyList<FlipSection> SectionsOf(int contrasts, StrataSets strata)
    {
        var sections = new List<FlipSection>();
        int offset = 0;
        for (short contrast = 0; contrast < contrasts; contrast++)
        {
            for (short stratum = ResultRow.AllStrata; stratum < strata.Count; stratum++)
            {
                int sets = strata.SetsOf(stratum).Length;
                sections.Add(new FlipSection(contrast, stratum, offset, sets));
                offset += sets;
            }
        }

        return sections;
    }
}
