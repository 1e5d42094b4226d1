namespace MatchedSuite.Statistics.Randomness;

/// <summary>Random bits as a function of (seed, purpose, index, counter): no state, no order, the same on every machine.</summary>
/// <remarks>
/// <para>Any thread, block or shard that asks for the same four numbers gets the same bits, so nothing random depends on how
/// the work was divided.</para>
/// <para>Philox 4x32 with 10 rounds: the seed is the key; index, purpose and counter together are the 128-bit counter block.
/// One block gives the 64-bit words of two successive counters.</para>
/// <para>Source: Salmon, Moraes, Dror and Shaw (2011), Parallel random numbers: as easy as 1, 2, 3, SC'11.</para>
/// </remarks>
public static class CounterRandom
{
    private const uint FirstMultiplier = 0xD2511F53;
    private const uint SecondMultiplier = 0xCD9E8D57;
    private const uint FirstKeyStep = 0x9E3779B9;
    private const uint SecondKeyStep = 0xBB67AE85;
    private const int Rounds = 10;

    // The counter's upper 16 bits share a word of the block with the purpose.
    private const long CounterLimit = 1L << 49;

    /// <summary>64 random bits.</summary>
    /// <param name="seed">The seed of the study; any number.</param>
    /// <param name="purpose">What the bits are for.</param>
    /// <param name="index">Which resample, study or endpoint; any number.</param>
    /// <param name="counter">Which word within it, from 0 to below 2^49.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="counter"/> is out of range.</exception>
    public static ulong Bits(long seed, RandomPurpose purpose, long index, long counter)
    {
        var (even, odd) = Pair(seed, purpose, index, counter);
        return (counter & 1) == 0 ? even : odd;
    }

    /// <summary>The words of counters 0, 1, 2, …: as many calls of <see cref="Bits"/>, in half the time.</summary>
    public static void Fill(long seed, RandomPurpose purpose, long index, Span<ulong> bits)
    {
        for (int counter = 0; counter < bits.Length; counter += 2)
        {
            var (even, odd) = Pair(seed, purpose, index, counter);
            bits[counter] = even;
            if (counter + 1 < bits.Length)
                bits[counter + 1] = odd;
        }
    }

    /// <summary>A uniform number in [0, 1), a multiple of 2^-53.</summary>
    public static double Uniform(long seed, RandomPurpose purpose, long index, long counter) =>
        (Bits(seed, purpose, index, counter) >> 11) * (1.0 / (1L << 53));

    /// <summary>A whole number from 0 to below <paramref name="bound"/>; no value is favoured by more than 2^-33 of its share.</summary>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="bound"/> is not positive.</exception>
    public static int IndexBelow(int bound, long seed, RandomPurpose purpose, long index, long counter)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(bound);
        return (int)Math.BigMul(Bits(seed, purpose, index, counter), (ulong)bound, out _);
    }

    /// <summary>The published block function: ten rounds of Philox 4x32 over a counter block under a key.</summary>
    internal static (uint First, uint Second, uint Third, uint Fourth) Block(
        (uint First, uint Second, uint Third, uint Fourth) block, (uint First, uint Second) key)
    {
        for (int round = 0; round < Rounds; round++)
        {
            ulong first = (ulong)FirstMultiplier * block.First;
            ulong third = (ulong)SecondMultiplier * block.Third;
            block = ((uint)(third >> 32) ^ block.Second ^ key.First, (uint)third,
                (uint)(first >> 32) ^ block.Fourth ^ key.Second, (uint)first);
            key = (key.First + FirstKeyStep, key.Second + SecondKeyStep);
        }

        return block;
    }

    private static (ulong Even, ulong Odd) Pair(long seed, RandomPurpose purpose, long index, long counter)
    {
        if ((ulong)counter >= CounterLimit)
            throw new ArgumentOutOfRangeException(nameof(counter), counter, "The counter must lie between 0 and 2^49 - 1.");
        long pair = counter >> 1;
        var block = Block(
            ((uint)index, (uint)(index >> 32), (uint)pair, ((uint)purpose << 16) | (uint)(pair >> 32)),
            ((uint)seed, (uint)(seed >> 32)));
        return (block.First | ((ulong)block.Second << 32), block.Third | ((ulong)block.Fourth << 32));
    }
}
