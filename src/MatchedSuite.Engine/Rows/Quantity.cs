namespace MatchedSuite.Engine.Rows;

/// <summary>The numbers of <c>details.parquet</c>; each is written as its name in small letters with hyphens and described in docs/results.md.</summary>
public enum Quantity : short
{
    /// <summary>Values of index samples below the detection limit.</summary>
    IndexBelowLimit,

    /// <summary>Values of reference samples below the detection limit.</summary>
    ReferenceBelowLimit,
}
