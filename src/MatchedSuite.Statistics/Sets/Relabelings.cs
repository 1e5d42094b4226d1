using System.Runtime.InteropServices;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Sets;

/// <summary>What other assignments of the roles within sets would have given: all of them, or random ones.</summary>
/// <remarks>
/// The statistic is Σ(mean index − mean reference). For an assignment, <see cref="Falls"/> holds how far its statistic lies below
/// the observed one, and <see cref="Steps"/> how much slower than the observed one it moves with a shift of the index role: 0 for the
/// observed assignment itself. Their quotient is the shift at which both are equal.
/// </remarks>
internal readonly ref struct Relabelings
{
    // A word is cut into numbers while so many combinations of them fit: none is favoured by more than 2^-32 of its share.
    private const ulong MostCombinations = 1UL << 32;

    private readonly SetSample _sets;
    private readonly ReadOnlySpan<double> _centred;

    // 1/k + 1/m of each set: with its mean taken off, mean index − mean reference is this times the sum over the index members.
    private readonly ReadOnlySpan<double> _factors;

    /// <summary>Takes the sets and computes the observed statistic.</summary>
    /// <param name="sets">At least one set.</param>
    /// <param name="mostListed">Up to how many assignments are listed rather than drawn.</param>
    /// <param name="resamples">How many are drawn otherwise.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public Relabelings(in SetSample sets, int mostListed, int resamples, in Scratch.Frame frame)
    {
        _sets = sets;
        Span<double> centred = frame.Doubles(sets.Members);
        Span<double> factors = frame.Doubles(sets.Sets);
        for (int s = 0; s < sets.Sets; s++)
        {
            ReadOnlySpan<double> values = sets.Values[sets.Starts[s]..sets.Starts[s + 1]];
            int index = sets.IndexCounts[s], reference = values.Length - index;
            factors[s] = (1.0 / index) + (1.0 / reference);
            Span<double> own = centred[sets.Starts[s]..sets.Starts[s + 1]];
            double sum = 0, largest = 0, observed = 0;
            foreach (double value in values)
                sum += value - values[0];
            double mean = sum / values.Length;
            for (int i = 0; i < values.Length; i++)
            {
                own[i] = values[i] - values[0] - mean;
                largest = Math.Max(largest, Math.Abs(own[i]));
                observed += i < index ? own[i] : 0;
            }

            Statistic += observed * factors[s];
            Bound += largest * factors[s] * Math.Min(index, reference);
        }

        _centred = centred;
        _factors = factors;
        Listed = CountUpTo(mostListed);
        int count = Listed > 0 ? Listed : resamples;
        Falls = frame.Doubles(count);
        Steps = frame.Doubles(count);
    }

    /// <summary>Observed Σ(mean index − mean reference), endpoint units.</summary>
    public double Statistic { get; }

    /// <summary>No assignment's statistic is larger in size.</summary>
    public double Bound { get; }

    /// <summary>Number of all assignments where they are few enough to list, else 0.</summary>
    public int Listed { get; }

    /// <summary>Observed statistic minus an assignment's.</summary>
    public Span<double> Falls { get; }

    /// <summary>What the same differences are of the role itself; at least 0.</summary>
    public Span<double> Steps { get; }

    /// <summary>Fills in all assignments.</summary>
    /// <param name="frame">Working memory.</param>
    public void List(in Scratch.Frame frame)
    {
        Falls[0] = 0;
        Steps[0] = 0;
        int filled = 1;
        for (int s = 0; s < _sets.Sets; s++)
        {
            int chosen = Smaller(s), members = _sets.Starts[s + 1] - _sets.Starts[s];
            Span<int> subset = frame.Integers(chosen);
            for (int i = 0; i < chosen; i++)
                subset[i] = i;

            // The first subset overwrites what is there only after the others have been put behind it.
            int before = filled;
            var (firstFall, firstStep) = Assign(s, subset);
            while (Next(subset, members))
            {
                var (fall, step) = Assign(s, subset);
                for (int i = 0; i < before; i++, filled++)
                {
                    Falls[filled] = Falls[i] + fall;
                    Steps[filled] = Steps[i] + step;
                }
            }

            for (int i = 0; i < before; i++)
            {
                Falls[i] += firstFall;
                Steps[i] += firstStep;
            }
        }
    }

    /// <summary>Fills in random assignments, each as likely as any other.</summary>
    /// <param name="seed">Seed of the run.</param>
    /// <param name="frame">Working memory.</param>
    public void Draw(long seed, in Scratch.Frame frame)
    {
        int largest = 0;
        for (int s = 0; s < _sets.Sets; s++)
            largest = Math.Max(largest, Smaller(s));
        Span<int> subset = frame.Integers(largest);
        Span<ulong> words = MemoryMarshal.Cast<long, ulong>(frame.Longs(WordsNeeded()));
        for (int resample = 0; resample < Falls.Length; resample++)
        {
            CounterRandom.Fill(seed, RandomPurpose.Relabelings, resample, words);
            double falls = 0, steps = 0;
            ulong rest = words[0], combinations = 1;
            for (int s = 0, used = 1; s < _sets.Sets; s++)
            {
                int members = _sets.Starts[s + 1] - _sets.Starts[s];
                Span<int> own = subset[..Smaller(s)];

                // Floyd's sampling: each subset of this size is as likely as any other.
                for (int i = 0; i < own.Length; i++)
                {
                    int last = members - own.Length + i;
                    if (Exhausted(ref combinations, last + 1))
                        rest = words[used++];
                    int pick = (int)Math.BigMul(rest, (ulong)(last + 1), out rest);
                    own[i] = own[..i].Contains(pick) ? last : pick;
                }

                var (fall, step) = Assign(s, own);
                falls += fall;
                steps += step;
            }

            Falls[resample] = falls;
            Steps[resample] = steps;
        }
    }

    private int WordsNeeded()
    {
        int words = 1;
        ulong combinations = 1;
        for (int s = 0; s < _sets.Sets; s++)
        {
            int members = _sets.Starts[s + 1] - _sets.Starts[s];
            for (int i = members - Smaller(s); i < members; i++)
                words += Exhausted(ref combinations, i + 1) ? 1 : 0;
        }

        return words;
    }

    // A product of a word with a bound has the number above the point and, below it, what is left of the word's randomness.
    private static bool Exhausted(ref ulong combinations, int bound)
    {
        combinations *= (ulong)bound;
        if (combinations <= MostCombinations)
            return false;
        combinations = (ulong)bound;
        return true;
    }

    // The next subset in lexicographic order; false after the last.
    private static bool Next(Span<int> subset, int members)
    {
        int place = subset.Length - 1;
        while (place >= 0 && subset[place] == members - subset.Length + place)
            place--;
        if (place < 0)
            return false;
        subset[place]++;
        for (int i = place + 1; i < subset.Length; i++)
            subset[i] = subset[i - 1] + 1;
        return true;
    }

    // One set's part, given which members take the smaller role.
    private (double Fall, double Step) Assign(int set, ReadOnlySpan<int> subset)
    {
        int from = _sets.Starts[set], index = _sets.IndexCounts[set], members = _sets.Starts[set + 1] - from;
        bool indexIsSmaller = index <= members - index;
        int first = indexIsSmaller ? 0 : index;
        if (subset.Length == 1)
        {
            double difference = _centred[from + first] - _centred[from + subset[0]];
            return subset[0] == first ? (0, 0) : ((indexIsSmaller ? difference : -difference) * _factors[set], _factors[set]);
        }

        double observed = 0, assigned = 0;
        int kept = 0;
        for (int i = 0; i < subset.Length; i++)
        {
            observed += _centred[from + first + i];
            assigned += _centred[from + subset[i]];
            kept += subset[i] >= first && subset[i] < first + subset.Length ? 1 : 0;
        }

        double fall = indexIsSmaller ? observed - assigned : assigned - observed;
        return kept == subset.Length ? (0, 0) : (fall * _factors[set], (subset.Length - kept) * _factors[set]);
    }

    private int Smaller(int set) =>
        Math.Min(_sets.IndexCounts[set], _sets.Starts[set + 1] - _sets.Starts[set] - _sets.IndexCounts[set]);

    private int CountUpTo(int most)
    {
        long count = 1;
        for (int s = 0; s < _sets.Sets; s++)
        {
            int members = _sets.Starts[s + 1] - _sets.Starts[s];
            long ways = 1;
            for (int i = 1; i <= Smaller(s) && ways <= most; i++)
                ways = ways * (members - i + 1) / i;
            count *= ways;
            if (count > most)
                return 0;
        }

        return (int)count;
    }
}
