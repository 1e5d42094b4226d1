using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Planning;

/// <summary>What is kept of every endpoint for adjustments by sign flips of whole sets, or by relabelings.</summary>
/// <param name="Statistic">
/// What endpoints are compared by: the score where every primary method flips scores, else t, which for signed ranks is the t of the
/// ranks and orders the flips of one endpoint as their sum does. Relabelings have a statistic of their own.
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

    /// <summary>The parts of a design whose signs are flipped: for each contrast all of its sets, then those of each stratum.</summary>
    /// <param name="contrasts">The sets of each contrast; null where nothing is flipped for it.</param>
    internal static IReadOnlyList<FlipSection> SectionsOf(IReadOnlyList<StrataSets?> contrasts) => SectionsOf(contrasts, _ => null);

    /// <summary>The same where labels are exchanged.</summary>
    /// <param name="contrasts">The sets of each contrast; null where nothing is kept for it.</param>
    /// <param name="blocksOf">Who may exchange labels among such sets.</param>
    internal static IReadOnlyList<FlipSection> SectionsOf(IReadOnlyList<StrataSets?> contrasts, Func<int[], RelabelBlocks?> blocksOf)
    {
        var sections = new List<FlipSection>();
        int offset = 0;
        for (short contrast = 0; contrast < contrasts.Count; contrast++)
        {
            for (int position = 0; position < (contrasts[contrast]?.Codes.Length ?? 0); position++)
            {
                int[] sets = contrasts[contrast]!.SetsAt(position).ToArray();
                sections.Add(new FlipSection(contrast, contrasts[contrast]!.Codes[position], offset, sets.Length) { Blocks = blocksOf(sets) });
                offset += sets.Length;
            }
        }

        return sections;
    }
}
