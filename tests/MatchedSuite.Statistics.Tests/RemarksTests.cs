using System.Numerics;

namespace MatchedSuite.Statistics.Tests;

public class RemarksTests
{
    [Fact]
    public void Every_remark_has_a_bit_of_its_own()
    {
        long[] bits = [.. Enum.GetNames<Remarks>().Select(name => (long)Enum.Parse<Remarks>(name)).Where(bit => bit != 0)];
        Assert.All(bits, bit => Assert.True(BitOperations.IsPow2(bit)));
        Assert.Equal(bits.Length, bits.Distinct().Count());
    }
}
