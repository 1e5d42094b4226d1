using System.Numerics;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Tests.Randomness;

public class CounterRandomTests
{
    // Known answers for philox4x32 with 10 rounds that its authors distribute with the algorithm.
    [Theory]
    [InlineData(0x00000000, 0x00000000, 0x00000000, 0x00000000, 0x00000000, 0x00000000, 0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8)]
    [InlineData(0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff, 0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd)]
    [InlineData(0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344, 0xa4093822, 0x299f31d0, 0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1)]
    public void The_block_function_gives_the_known_answers_of_its_authors(
        uint c0, uint c1, uint c2, uint c3, uint k0, uint k1, uint r0, uint r1, uint r2, uint r3) =>
        Assert.Equal((r0, r1, r2, r3), CounterRandom.Block((c0, c1, c2, c3), (k0, k1)));

    [Fact]
    public void Filling_a_span_gives_the_same_words_as_asking_one_by_one()
    {
        var filled = new ulong[7];
        CounterRandom.Fill(-3, RandomPurpose.SignFlips, 1L << 40, filled);
        for (int counter = 0; counter < filled.Length; counter++)
            Assert.Equal(CounterRandom.Bits(-3, RandomPurpose.SignFlips, 1L << 40, counter), filled[counter]);
    }

    [Fact]
    public void Seed_purpose_index_and_counter_each_change_the_word()
    {
        ulong word = CounterRandom.Bits(7, RandomPurpose.SignFlips, 5, 3);
        ulong[] others =
        [
            CounterRandom.Bits(8, RandomPurpose.SignFlips, 5, 3), CounterRandom.Bits(7 + (1L << 32), RandomPurpose.SignFlips, 5, 3),
            CounterRandom.Bits(7, RandomPurpose.Relabelings, 5, 3), CounterRandom.Bits(7, RandomPurpose.SignFlips, 6, 3),
            CounterRandom.Bits(7, RandomPurpose.SignFlips, 5 + (1L << 32), 3), CounterRandom.Bits(7, RandomPurpose.SignFlips, 5, 2),
            CounterRandom.Bits(7, RandomPurpose.SignFlips, 5, 3 + (1L << 34)),
        ];
        Assert.Equal(others.Length + 1, others.Append(word).Distinct().Count());
    }

    [Fact]
    public void Every_bit_is_set_half_the_time_and_numbers_are_even_over_their_range()
    {
        const int Draws = 20_000;
        var set = new int[64];
        var cells = new int[10];
        double sum = 0;
        for (int i = 0; i < Draws; i++)
        {
            ulong word = CounterRandom.Bits(1, RandomPurpose.SignFlips, i, 0);
            for (int bit = 0; bit < 64; bit++)
                set[bit] += (int)(word >> bit & 1);
            sum += CounterRandom.Uniform(1, RandomPurpose.Planning, i, 1);
            cells[CounterRandom.IndexBelow(10, 1, RandomPurpose.Relabelings, 0, i)]++;
        }

        // Five standard errors of a fair count or mean.
        Assert.All(set, count => Assert.InRange(count, Draws / 2 - 354, Draws / 2 + 354));
        Assert.All(cells, count => Assert.InRange(count, Draws / 10 - 212, Draws / 10 + 212));
        Assert.InRange(sum / Draws, 0.5 - 0.0103, 0.5 + 0.0103);
    }

    [Fact]
    public void Neighbouring_resamples_differ_in_about_half_of_their_bits()
    {
        int differing = 0;
        for (int i = 0; i < 1000; i++)
            differing += BitOperations.PopCount(CounterRandom.Bits(9, RandomPurpose.SignFlips, i, 0) ^ CounterRandom.Bits(9, RandomPurpose.SignFlips, i + 1, 0));
        Assert.InRange(differing, 32_000 - 633, 32_000 + 633);
    }

    [Fact]
    public void A_counter_or_bound_out_of_range_is_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => CounterRandom.Bits(1, RandomPurpose.SignFlips, 0, -1));
        Assert.Throws<ArgumentOutOfRangeException>(() => CounterRandom.Bits(1, RandomPurpose.SignFlips, 0, 1L << 49));
        Assert.Throws<ArgumentOutOfRangeException>(() => CounterRandom.IndexBelow(0, 1, RandomPurpose.SignFlips, 0, 0));
    }
}
