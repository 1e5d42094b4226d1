namespace MatchedSuite.Storage.Tables;

/// <summary>Name and type of one column of a written table.</summary>
public sealed record TableColumn(string Name, ColumnType Type);
