using System.Globalization;
using System.Text.RegularExpressions;
using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// The power of the paired t-test, a tail of the noncentral t: mpmath quadrature, base R power.t.test and statsmodels TTestPower
/// (Inputs/expected.csv, data set "power"; "strict" adds the opposite tail).
/// </summary>
public partial class NoncentralTTests
{
    public static TheoryData<string> Cases => [.. Expected.Cases("power").Where(name => Parameters().IsMatch(name))];

    [Fact]
    public void All_fourteen_power_cases_are_there() => Assert.Equal(14, Cases.Count);

    [Theory]
    [MemberData(nameof(Cases))]
    public void Power_of_the_paired_t_test_is_the_tail_beyond_the_critical_value(string name)
    {
        Match match = Parameters().Match(name);
        double n = Part(match, 1), delta = Part(match, 2), sd = Part(match, 3), alpha = Part(match, 4);
        double df = n - 1;
        double noncentrality = delta / sd * Math.Sqrt(n);
        double two = StudentT.UpperQuantile(alpha / 2, df);
        double one = StudentT.UpperQuantile(alpha, df);
        double upper = NoncentralT.UpperTail(two, df, noncentrality).Value;

        Expected.Check(upper, "power", name, "power_two_upper_tail_only");
        Expected.Check(upper + NoncentralT.LowerTail(-two, df, noncentrality).Value, "power", name, "power_two_strict");
        Expected.Check(NoncentralT.UpperTail(one, df, noncentrality).Value, "power", name, "power_one_sided");
        Assert.Equal(noncentrality, NoncentralT.Noncentrality(two, df, upper), 1e-12 * noncentrality);
    }

    [GeneratedRegex("^power_paired_t_n([0-9.]+)_delta([0-9.]+)_sd([0-9.]+)_alpha([0-9.]+)$")]
    private static partial Regex Parameters();

    private static double Part(Match match, int group) => double.Parse(match.Groups[group].Value, CultureInfo.InvariantCulture);
}
