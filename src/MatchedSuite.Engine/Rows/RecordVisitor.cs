namespace MatchedSuite.Engine.Rows;

/// <summary>Sees one record of a store at its position.</summary>
public delegate void RecordVisitor<T>(int position, in T record)
    where T : unmanaged;
