using MatchedSuite.Storage;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>data</c>; paths are full paths.</summary>
public sealed record DataSection
{
    /// <summary>The sample sheet: one row a sample with links, roles, covariates (and endpoints, when there is no other file).</summary>
    public required string Samples { get; init; }

    /// <summary>The sample sheet's key column; null when rows need no name.</summary>
    public string? Sample { get; init; }

    /// <summary>The file with the measurements; null when the sample sheet holds them.</summary>
    public string? Values { get; init; }

    /// <summary>How the measurements lie in their file.</summary>
    public ValueLayout Layout { get; init; } = ValueLayout.SampleRows;

    /// <summary>The column with endpoint names in endpoint rows and long tables; null takes the first.</summary>
    public string? Endpoint { get; init; }

    /// <summary>Long tables: the column with the values.</summary>
    public string? Value { get; init; }

    /// <summary>Delimiter, decimal mark and missing tokens.</summary>
    public TextDialect Dialect { get; init; } = TextDialect.Usual;
}
