using Parquet.Schema;

namespace MatchedSuite.Storage.Columnar;

/// <summary>One top-level column of a Parquet file.</summary>
/// <param name="Name">Its name, trimmed.</param>
/// <param name="Field">The library's field; null for a nested column, which is no number and no text.</param>
internal sealed record ParquetColumn(string Name, DataField? Field)
{
    private static readonly HashSet<Type> NumberTypes =
    [
        typeof(double), typeof(float), typeof(decimal), typeof(bool), typeof(sbyte), typeof(byte), typeof(short), typeof(ushort),
        typeof(int), typeof(uint), typeof(long), typeof(ulong),
    ];

    public static ParquetColumn Of(Field field) =>
        new(field.Name.Trim(), field is DataField { IsArray: false, MaxRepetitionLevel: 0 } flat ? flat : null);

    /// <summary>True for the types that become doubles.</summary>
    public bool IsNumber => Field is not null && NumberTypes.Contains(Field.ClrType);

    /// <summary>True for text.</summary>
    public bool IsText => Field is not null && (Field.ClrType == typeof(string) || Field.ClrType == typeof(ReadOnlyMemory<char>));

    /// <summary>True for bytes without a meaning.</summary>
    public bool IsBytes => Field is not null && (Field.ClrType == typeof(byte[]) || Field.ClrType == typeof(ReadOnlyMemory<byte>));

    /// <summary>The type as a message shows it.</summary>
    public string TypeName => Field switch
    {
        null => "a nested type",
        DateTimeDataField { DateTimeFormat: DateTimeFormat.Date } => "dates",
        _ when IsText => "text",
        _ when IsBytes => "bytes",
        _ when Field.ClrType == typeof(DateTime) => "timestamps",
        _ when Field.ClrType == typeof(DateOnly) => "dates",
        _ when Field.ClrType == typeof(TimeSpan) || Field.ClrType == typeof(TimeOnly) => "times",
        _ => $"the type {Field.ClrType.Name}",
    };
}
