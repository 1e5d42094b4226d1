using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

/// <summary>Matched sets as arrays, drawn at random or written down, with the changes that laws speak of.</summary>
internal sealed record DrawnSets(double[] Values, int[] Starts, bool[] IsIndex, double[] Covariates)
{
    private static readonly Gen<double> Decimal = Gen.Int[-40, 40].Select(tenths => tenths / 10.0);

    /// <summary>Sets of 2 to 6 members with at least one of each role.</summary>
    public static Gen<DrawnSets> AnyShape(int fewest, int most, int covariates = 0) =>
        Gen.Int[2, 6].SelectMany(members => Gen.Int[1, members - 1], (members, index) => (members, index)).Array[fewest, most]
            .SelectMany(shapes => Fill(shapes, covariates));

    /// <summary>Sets of one index and one reference member.</summary>
    public static Gen<DrawnSets> Pairs(int fewest, int most) =>
        Gen.Int[fewest, most].SelectMany(count => Fill([.. Enumerable.Repeat((2, 1), count)], 0));

    /// <summary>Sets of one index member and three reference members.</summary>
    public static Gen<DrawnSets> OneToThree(int fewest, int most) =>
        Gen.Int[fewest, most].SelectMany(count => Fill([.. Enumerable.Repeat((4, 1), count)], 0));

    public int Count => Starts.Length - 1;

    public SetSample Take(in Scratch.Frame frame) => SetSample.Of(Values, Starts, IsIndex, Covariates, frame);

    public TestResult Run(SetMethod method, TestOptions? options = null)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        return method(Take(frame), options ?? TestOptions.Default, scratch);
    }

    public ConditionalLogisticFit Fit(TestOptions? options = null)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        return ConditionalLogistic.Fit(Take(frame), options ?? TestOptions.Default, scratch);
    }

    public DrawnSets With(Func<double, double> change) => this with { Values = Array.ConvertAll(Values, value => change(value)) };

    public DrawnSets Swapped() => this with { IsIndex = Array.ConvertAll(IsIndex, role => !role) };

    public DrawnSets Binary() => With(value => value > 0 ? 1 : 0);

    /// <summary>The same sets in another order, the members of each turned round.</summary>
    public DrawnSets Turned()
    {
        int[] members = [.. Enumerable.Range(0, Values.Length).Reverse()];
        int[] starts = [.. Starts.Reverse().Select(start => Values.Length - start)];
        double[] covariates = [.. Enumerable.Range(0, Covariates.Length / Values.Length)
            .SelectMany(c => members.Select(member => Covariates[(c * Values.Length) + member]))];
        return new DrawnSets([.. members.Select(m => Values[m])], starts, [.. members.Select(m => IsIndex[m])], covariates);
    }

    /// <summary>One more set; the sample must be without covariates.</summary>
    public DrawnSets And(double[] values, bool[] isIndex) =>
        new([.. Values, .. values], [.. Starts, Values.Length + values.Length], [.. IsIndex, .. isIndex], []);

    /// <summary>Members of one set with the index role, then those without.</summary>
    public (double[] Index, double[] Reference) Split(int set)
    {
        int[] members = [.. Enumerable.Range(Starts[set], Starts[set + 1] - Starts[set])];
        return ([.. members.Where(m => IsIndex[m]).Select(m => Values[m])], [.. members.Where(m => !IsIndex[m]).Select(m => Values[m])]);
    }

    private static Gen<DrawnSets> Fill((int Members, int Index)[] shapes, int covariates)
    {
        int[] starts = [0, .. shapes.Select((_, s) => shapes.Take(s + 1).Sum(shape => shape.Members))];
        bool[] isIndex = [.. shapes.SelectMany(shape => Enumerable.Range(0, shape.Members).Select(i => i < shape.Index))];
        return Decimal.Array[starts[^1]].SelectMany(
            values => Decimal.Array[starts[^1] * covariates], (values, columns) => new DrawnSets(values, starts, isIndex, columns));
    }
}

/// <summary>A method for sets.</summary>
internal delegate TestResult SetMethod(in SetSample sets, TestOptions options, Scratch scratch);
