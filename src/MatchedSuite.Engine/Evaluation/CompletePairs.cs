using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>The complete pairs of one endpoint, contrast and stratum, with what methods may ask for beside the endpoint.</summary>
internal readonly ref struct CompletePairs
{
    private CompletePairs(PairInput input, ReadOnlySpan<int> places, int designed)
    {
        Input = input;
        Places = places;
        Designed = designed;
    }

    /// <summary>The pairs.</summary>
    public PairInput Input { get; }

    /// <summary>Position of each pair among the sets of the stratum.</summary>
    public ReadOnlySpan<int> Places { get; }

    /// <summary>Pairs that the matching gives, complete or not.</summary>
    public int Designed { get; }

    /// <summary>Number of complete pairs.</summary>
    public int Count => Input.Pairs.Count;

    /// <summary>Picks the pairs that have both values and everything else that is asked for.</summary>
    /// <param name="index">Values of the index place, one a set; NaN where missing.</param>
    /// <param name="reference">Values of the reference place.</param>
    /// <param name="sets">The sets of the stratum.</param>
    /// <param name="columns">What is known of each set.</param>
    /// <param name="covariates">Whether the pairs' covariates must be known.</param>
    /// <param name="zeros">What the signed-rank test does with differences of zero.</param>
    /// <param name="frame">Working memory that outlives the pairs.</param>
    public static CompletePairs Of(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, ReadOnlySpan<int> sets, PairColumns columns, CovariateUse covariates,
        ZeroRule zeros, in Scratch.Frame frame)
    {
        Span<int> used = frame.Integers(sets.Length);
        Span<int> places = frame.Integers(sets.Length);
        int count = 0;
        for (int place = 0; place < sets.Length; place++)
        {
            int set = sets[place];
            if (double.IsNaN(index[set]) || double.IsNaN(reference[set]) || !columns.TimesKnown(set))
                continue;
            if (covariates != CovariateUse.Ignored && !columns.CovariatesKnown[set])
                continue;
            places[count] = place;
            used[count++] = set;
        }

        used = used[..count];
        PairSample pairs = PairSample.Of(Picked(index, used, frame), Picked(reference, used, frame), frame);
        Span<double> adjusting = covariates == CovariateUse.Ignored ? [] : frame.Doubles(count * columns.Covariates.Length);
        for (int column = 0; column < columns.Covariates.Length && !adjusting.IsEmpty; column++)
            Pick(columns.Covariates[column], used, adjusting.Slice(column * count, count));
        return new CompletePairs(
            new PairInput(pairs, zeros)
            {
                Covariates = adjusting,
                Exposure = Optional(columns.Exposure, used, frame),
                IndexTime = Optional(columns.IndexTime, used, frame),
                ReferenceTime = Optional(columns.ReferenceTime, used, frame),
            },
            places[..count],
            sets.Length);
    }

    private static ReadOnlySpan<double> Optional(double[] column, ReadOnlySpan<int> used, in Scratch.Frame frame) =>
        column.Length == 0 ? [] : Picked(column, used, frame);

    private static Span<double> Picked(ReadOnlySpan<double> column, ReadOnlySpan<int> used, in Scratch.Frame frame)
    {
        Span<double> picked = frame.Doubles(used.Length);
        Pick(column, used, picked);
        return picked;
    }

    private static void Pick(ReadOnlySpan<double> column, ReadOnlySpan<int> used, Span<double> picked)
    {
        for (int i = 0; i < used.Length; i++)
            picked[i] = column[used[i]];
    }
}
