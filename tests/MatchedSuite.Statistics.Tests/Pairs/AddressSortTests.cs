using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class AddressSortTests
{
    private static readonly Gen<double> Value = Gen.OneOf(
        Gen.Double[-1, 1], Gen.Int[-3, 3].Select(i => i / 10.0), Gen.Double[-700, 700].Select(Math.Exp), Gen.Const(1e308), Gen.Const(-1e308));

    [Fact]
    public void Order_is_that_of_the_library_whatever_the_values() =>
        Gen.OneOf(
            Value.Array[0, 300], Gen.Double[-1, 1].Array[40, 300], Gen.Int[-9, 9].Select(i => i / 10.0).Array[40, 300],
            Gen.Double[0, 700].Select(Math.Exp).Array[40, 300], Gen.Const(2.5).Array[40, 60]).Sample(values =>
        {
            double[] expected = [.. values.Order()];
            Sort(values);
            Assert.Equal(expected, values);
        });

    [Fact]
    public void Nearly_all_values_in_one_bucket_are_sorted_too()
    {
        var random = new Random(5);
        double[] values = [.. Enumerable.Range(0, 5000).Select(i => i == 77 ? 1e12 : random.NextDouble())];
        double[] expected = [.. values.Order()];
        Sort(values);
        Assert.Equal(expected, values);
    }

    private static void Sort(double[] values)
    {
        using var frame = new Scratch().Open();
        AddressSort.Sort(values, frame);
    }
}
