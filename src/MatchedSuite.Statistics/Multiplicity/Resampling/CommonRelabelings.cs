using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Other labellings of the members within their blocks, as changes of sign of <see cref="LabelledValues"/>.</summary>
/// <remarks>
/// Every labelling keeps the number of index members of each block. The members of the label that fewer have are chosen: random ones
/// block after block by Floyd's algorithm, each from a random number of its own, so a block's part depends on seed, resample
/// and the blocks up to it; listed ones by their place in colexicographic order.
/// Source: Bentley and Floyd (1987), Communications of the ACM 30(9), 754-757.
/// </remarks>
internal sealed class CommonRelabelings : ISignPatterns
{
    private readonly RelabelBlocks _blocks;
    private readonly long _seed;
    private readonly ulong[] _observed;
    private readonly long[] _ways;
    private readonly long _place;

    public CommonRelabelings(RelabelBlocks blocks, long seed, int resamples)
    {
        _blocks = blocks;
        _seed = seed;
        Words = (blocks.Members + 63) / 64;
        _observed = Observed(blocks, Words);
        _ways = new long[blocks.Count];
        long most = resamples + 1L;
        long all = 1;
        for (int block = 0; block < _ways.Length; block++)
        {
            _ways[block] = Choices(blocks.Size(block), blocks.Fewer(block), most);
            all = Math.Min(most + 1, all * _ways[block]);
        }

        Exhaustive = all <= most;
        Count = Exhaustive ? (int)(all - 1) : resamples;
        _place = Exhaustive ? PlaceOfObserved() : 0;
    }

    /// <inheritdoc/>
    public int Count { get; }

    /// <inheritdoc/>
    public bool Exhaustive { get; }

    /// <inheritdoc/>
    public int Words { get; }

    /// <inheritdoc/>
    public void Fill(int pattern, Span<ulong> words)
    {
        words = words[..Words];
        words.Clear();
        if (Exhaustive)
            List(pattern < _place ? pattern : pattern + 1L, words);
        else
            Draw(pattern, words);
        for (int word = 0; word < words.Length; word++)
            words[word] ^= _observed[word];
    }

    /// <inheritdoc/>
    /// <remarks>2U varies over the labellings of a block of n with k index members by 4k(n − k)/(n(n − 1)) times the block's sum of squares.</remarks>
    public double Variance(ReadOnlySpan<double> differences, double power)
    {
        double variance = 0;
        for (int block = 0; block < _blocks.Count; block++)
        {
            if (_blocks.Fewer(block) == 0)
                continue;
            double squares = 0;
            foreach (double difference in differences[_blocks.Starts[block].._blocks.Starts[block + 1]])
            {
                double scaled = difference * power;
                squares += scaled * scaled;
            }

            double size = _blocks.Size(block);
            double fewer = _blocks.Fewer(block);
            variance += 4 * fewer * (size - fewer) / (size * (size - 1)) * squares;
        }

        return variance;
    }

    private void Draw(int pattern, Span<ulong> words)
    {
        long counter = 0;
        for (int block = 0; block < _blocks.Count; block++)
        {
            int start = _blocks.Starts[block];
            int size = _blocks.Size(block);
            for (int last = size - _blocks.Fewer(block); last < size; last++)
            {
                int drawn = start + CounterRandom.IndexBelow(last + 1, _seed, RandomPurpose.Relabelings, pattern, counter++);
                Choose(IsChosen(drawn, words) ? start + last : drawn, words);
            }
        }
    }

    private void List(long place, Span<ulong> words)
    {
        for (int block = 0; block < _blocks.Count; block++)
        {
            long left = place % _ways[block];
            place /= _ways[block];
            int member = _blocks.Size(block);
            for (int chosen = _blocks.Fewer(block); chosen > 0; chosen--)
            {
                do
                    member--;
                while (Choices(member, chosen, left) > left);
                left -= Choices(member, chosen, left);
                Choose(_blocks.Starts[block] + member, words);
            }
        }
    }

    private long PlaceOfObserved()
    {
        long place = 0;
        long unit = 1;
        for (int block = 0; block < _blocks.Count; block++)
        {
            int chosen = 0;
            for (int member = 0; member < _blocks.Size(block); member++)
            {
                if (IsChosen(_blocks.Starts[block] + member, _observed))
                    place += unit * Choices(member, ++chosen, _ways[block]);
            }

            unit *= _ways[block];
        }

        return place;
    }

    private static ulong[] Observed(RelabelBlocks blocks, int words)
    {
        var observed = new ulong[words];
        for (int block = 0; block < blocks.Count; block++)
        {
            bool fewer = blocks.Fewer(block) == blocks.IndexCounts[block];
            for (int member = blocks.Starts[block]; member < blocks.Starts[block + 1]; member++)
            {
                if (blocks.IsIndex[member] == fewer)
                    Choose(member, observed);
            }
        }

        return observed;
    }

    // Ways to choose so many of the members; most + 1 where there are more than that.
    private static long Choices(int members, int chosen, long most)
    {
        long choices = members < chosen ? 0 : 1;
        for (int i = 1; i <= chosen && choices <= most && choices > 0; i++)
            choices = choices * (members - chosen + i) / i;
        return Math.Min(choices, most + 1);
    }

    private static bool IsChosen(int member, ReadOnlySpan<ulong> words) => (words[member >> 6] >> member & 1) != 0;

    private static void Choose(int member, Span<ulong> words) => words[member >> 6] |= 1UL << member;
}
