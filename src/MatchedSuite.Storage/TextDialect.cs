namespace MatchedSuite.Storage;

/// <summary>How a delimited text file is written.</summary>
public sealed record TextDialect
{
    /// <summary>The tokens that stand for a missing value unless the study file says otherwise.</summary>
    public static IReadOnlyList<string> UsualMissing { get; } = ["", "NA", "NaN", "."];

    /// <summary>Delimiter found by itself, decimal point, the usual missing tokens.</summary>
    public static TextDialect Usual { get; } = new();

    /// <summary>The delimiter; null lets it be found from the header line among comma, semicolon, tab and bar.</summary>
    public char? Delimiter { get; init; }

    /// <summary>The decimal mark, '.' or ','.</summary>
    public char DecimalMark { get; init; } = '.';

    /// <summary>Cell texts, trimmed, that are read as missing.</summary>
    public IReadOnlyList<string> Missing { get; init; } = UsualMissing;
}
