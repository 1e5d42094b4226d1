using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Sets;

/// <summary>The exponential function, four at a time and with the same bits on every machine.</summary>
/// <remarks>
/// Reduced by x = n·ln 2 + r with |r| at most ln(2)/2; there exp(r) = 1 + r + r²·q(r), q the Chebyshev interpolant of degree 9
/// on that range (relative error below 2e-17 before rounding). Multiplications and additions are separate, so a machine with
/// fused ones gives no other bits. Arguments outside [-700, 700] count as that end: exp(-700) = 1e-304 is nothing beside 1.
/// Error at most 2 units in the last place. The C runtime's exp differs between systems in the last place; this one does not.
/// </remarks>
internal static class Exponential
{
    private const double Reach = 700;
    private const double PerOctave = 1.4426950408889634;
    private const double OctaveHigh = 0.6931471803691238;       // ln 2 rounded to 32 bits: n times it is exact
    private const double OctaveLow = 1.9082149292705877e-10;    // ln 2 minus the above
    private const double IntegerMaker = 6755399441055744.0;     // 1.5·2^52: adding it rounds to an integer in the low bits
    private const double Q0 = 0.5000000000000001;
    private const double Q1 = 0.16666666666666669;
    private const double Q2 = 0.04166666666662413;
    private const double Q3 = 0.008333333333330062;
    private const double Q4 = 0.0013888888917213717;
    private const double Q5 = 0.00019841269863053618;
    private const double Q6 = 2.4801521295954376e-05;
    private const double Q7 = 2.7557268459997064e-06;
    private const double Q8 = 2.7620088445409746e-07;
    private const double Q9 = 2.510038549551032e-08;

    /// <summary>exp of four numbers.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Of(Vector256<double> x)
    {
        x = Vector256.MinNative(Vector256.MaxNative(x, Vector256.Create(-Reach)), Vector256.Create(Reach));
        Vector256<double> made = x * PerOctave + Vector256.Create(IntegerMaker);
        Vector256<double> n = made - Vector256.Create(IntegerMaker);
        Vector256<double> r = x - n * OctaveHigh - n * OctaveLow;
        Vector256<double> r2 = r * r;
        Vector256<double> r4 = r2 * r2;
        Vector256<double> low = Vector256.Create(Q0) + r * Q1 + (Vector256.Create(Q2) + r * Q3) * r2;
        Vector256<double> middle = Vector256.Create(Q4) + r * Q5 + (Vector256.Create(Q6) + r * Q7) * r2;
        Vector256<double> q = low + (middle + (Vector256.Create(Q8) + r * Q9) * r4) * r4;
        Vector256<double> power = (Vector256.ShiftLeft(made.AsInt64() + Vector256.Create(1023L), 52)).AsDouble();
        return (Vector256.Create(1.0) + (r + r2 * q)) * power;
    }

    /// <summary>exp of one number, the same bits as a lane of the other.</summary>
    public static double Of(double x)
    {
        x = Math.Min(Math.Max(x, -Reach), Reach);
        double made = x * PerOctave + IntegerMaker;
        double n = made - IntegerMaker;
        double r = x - n * OctaveHigh - n * OctaveLow;
        double r2 = r * r;
        double r4 = r2 * r2;
        double low = Q0 + r * Q1 + (Q2 + r * Q3) * r2;
        double middle = Q4 + r * Q5 + (Q6 + r * Q7) * r2;
        double q = low + (middle + (Q8 + r * Q9) * r4) * r4;
        double power = BitConverter.Int64BitsToDouble((BitConverter.DoubleToInt64Bits(made) + 1023) << 52);
        return (1 + (r + r2 * q)) * power;
    }
}
