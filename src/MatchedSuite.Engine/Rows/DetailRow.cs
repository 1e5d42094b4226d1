using System.Runtime.InteropServices;

namespace MatchedSuite.Engine.Rows;

/// <summary>One number beside a result that has no column of its own: a line of <c>details.parquet</c>.</summary>
[StructLayout(LayoutKind.Sequential)]
public struct DetailRow
{
    /// <summary>Position of the endpoint in the order of the data.</summary>
    public int Endpoint;

    /// <summary>Position of the contrast in the plan.</summary>
    public short Contrast;

    /// <summary>Position of the stratum in the plan, <see cref="ResultRow.AllStrata"/> or <see cref="ResultRow.BetweenStrata"/>.</summary>
    public short Stratum;

    /// <summary>Position of the method in the plan, or <see cref="NoMethod"/> for a number about the endpoint itself.</summary>
    public short Method;

    /// <summary>Which number it is.</summary>
    public Quantity Quantity;

    /// <summary>The number.</summary>
    public double Value;

    /// <summary>Method code of a number about the endpoint itself.</summary>
    public const short NoMethod = -1;
}
