using System.Runtime.InteropServices;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Rows;

/// <summary>One row of the results before adjustment: numbers and codes only, so that it can be kept on disk as it is.</summary>
[StructLayout(LayoutKind.Sequential)]
public struct ResultRow
{
    /// <summary>Stratum code of a row over all sets.</summary>
    public const short AllStrata = -1;

    /// <summary>Stratum code of a test between strata.</summary>
    public const short BetweenStrata = -2;

    /// <summary>Position of the endpoint in the order of the data.</summary>
    public int Endpoint;

    /// <summary>Position of the contrast in the plan.</summary>
    public short Contrast;

    /// <summary>Position of the stratum in the plan, <see cref="AllStrata"/> or <see cref="BetweenStrata"/>.</summary>
    public short Stratum;

    /// <summary>Position of the method in the plan.</summary>
    public short Method;

    /// <summary>Why there is no test, or <see cref="Outcome.Tested"/>.</summary>
    public short Outcome;

    /// <summary>1 for the kind's first method, else 0.</summary>
    public short Primary;

    /// <summary>Base of the logarithm the estimate is on: <see cref="LogBase"/>.</summary>
    public short LogBase;

    /// <summary>Sets used.</summary>
    public int Sets;

    /// <summary>Samples used.</summary>
    public int Samples;

    /// <summary>Complete-by-design sets not used because of missing values.</summary>
    public int Missing;

    /// <summary>Point estimate on the analysis scale.</summary>
    public double Estimate;

    /// <summary>Its standard error.</summary>
    public double StandardError;

    /// <summary>Lower confidence limit.</summary>
    public double Low;

    /// <summary>Upper confidence limit.</summary>
    public double High;

    /// <summary>Standardised effect.</summary>
    public double EffectSize;

    /// <summary>Test statistic.</summary>
    public double Statistic;

    /// <summary>Degrees of freedom.</summary>
    public double DegreesOfFreedom;

    /// <summary>Denominator degrees of freedom.</summary>
    public double DenominatorDegreesOfFreedom;

    /// <summary>The p-value; missing when untested.</summary>
    public Probability P;

    /// <summary>Smallest p-value this many sets could give; missing where there is no floor.</summary>
    public Probability SmallestPossibleP;

    /// <summary>Remarks for the reader.</summary>
    public Remarks Remarks;

    /// <summary>True where a test was made.</summary>
    public readonly bool IsTested => Outcome == (short)Statistics.Outcome.Tested;

    /// <summary>What the method found, as it was taken over.</summary>
    public readonly TestResult ToTestResult() => new()
    {
        Outcome = (Statistics.Outcome)Outcome,
        Sets = Sets,
        Samples = Samples,
        Estimate = Estimate,
        StandardError = StandardError,
        Interval = new Interval(Low, High),
        EffectSize = EffectSize,
        Statistic = Statistic,
        DegreesOfFreedom = DegreesOfFreedom,
        DenominatorDegreesOfFreedom = DenominatorDegreesOfFreedom,
        P = P,
        SmallestPossibleP = SmallestPossibleP,
        Remarks = Remarks,
    };

    /// <summary>Divides estimate, standard error and limits: from the endpoint's unit to standard deviations.</summary>
    public void DivideBy(double unit)
    {
        Estimate /= unit;
        StandardError /= unit;
        Low /= unit;
        High /= unit;
    }

    /// <summary>Takes over what a method found.</summary>
    public void Take(in TestResult result)
    {
        Outcome = (short)result.Outcome;
        Sets = result.Sets;
        Samples = result.Samples;
        Estimate = result.Estimate;
        StandardError = result.StandardError;
        Low = result.Interval.Low;
        High = result.Interval.High;
        EffectSize = result.EffectSize;
        Statistic = result.Statistic;
        DegreesOfFreedom = result.DegreesOfFreedom;
        DenominatorDegreesOfFreedom = result.DenominatorDegreesOfFreedom;
        P = result.P;
        SmallestPossibleP = result.SmallestPossibleP;
        Remarks |= result.Remarks;
    }
}
