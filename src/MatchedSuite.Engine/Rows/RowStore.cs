namespace MatchedSuite.Engine.Rows;

/// <summary>The result rows of a run in the order of the data.</summary>
public sealed class RowStore(string folder) : RecordStore<ResultRow>(Path.Combine(folder, "rows.scratch"));
