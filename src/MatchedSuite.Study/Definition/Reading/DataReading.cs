using MatchedSuite.Storage;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the section <c>data</c>.</summary>
internal static class DataReading
{
    private const string ColumnName = "the name of a column";

    private static readonly string[] Delimiters = ["auto", ",", ";", "tab", "|"];

    /// <summary>The section; paths are made full, relative to the study file's folder.</summary>
    public static DataSection Read(Section section, string folder, Capabilities capabilities)
    {
        string samples = section.RequiredText("samples", "the path of the sample sheet");
        string? values = section.Text("values", "the path of the file with the measurements");
        ValueLayout layout = section.Available("layout", section.Choice<ValueLayout>("layout") ?? ValueLayout.SampleRows, capabilities.Layouts);
        var data = new DataSection
        {
            Samples = Path.GetFullPath(samples, folder),
            Sample = section.Text("sample", ColumnName),
            Values = values is null ? null : Path.GetFullPath(values, folder),
            Layout = layout,
            Endpoint = section.Text("endpoint", ColumnName),
            Value = section.Text("value", ColumnName),
            Dialect = Dialect(section),
        };
        RefuseImpossible(section, data);
        return data;
    }

    private static TextDialect Dialect(Section section)
    {
        string delimiter = section.Named("delimiter", Delimiters) ?? "auto";
        string decimalMark = section.Named("decimal", [".", ","]) ?? ".";
        if (delimiter == decimalMark)
            throw section.Refuse("decimal", "the comma is both delimiter and decimal mark", "two different marks", "Write delimiter: \";\" or decimal: \".\".");
        return new TextDialect
        {
            Delimiter = delimiter switch { "auto" => null, "tab" => '\t', _ => delimiter[0] },
            DecimalMark = decimalMark[0],
            Missing = Missing(section) ?? TextDialect.UsualMissing,
        };
    }

    // A blank token is right here and nowhere else: it is the empty cell.
    private static List<string>? Missing(Section section)
    {
        const string Expected = "a list of texts that are read as missing, such as [\"\", \"NA\"]";
        if (section.Scalars("missing", Expected) is not { } scalars)
            return null;
        var tokens = new List<string>();
        foreach (ScalarNode scalar in scalars)
        {
            string token = scalar.Text.Trim();
            if (tokens.Contains(token))
                throw section.Refuse("missing", scalar, $"'{token}' stands in the list twice", Expected, "Remove one of the two.");
            tokens.Add(token);
        }

        return tokens;
    }

    private static void RefuseImpossible(Section section, DataSection data)
    {
        string layout = WrittenName.Of(data.Layout);
        if (data.Values is null && data.Layout != ValueLayout.SampleRows)
            throw section.Absent("values", $"the path of the file with the measurements, since the layout is '{layout}'");
        if (data.Values is not null && data.Sample is null)
            throw section.Absent("sample", "the name of the sample sheet's key column, since the measurements stand in a file of their own");
        if (data.Layout == ValueLayout.Long && data.Endpoint is null)
            throw section.Absent("endpoint", "the name of the column with the endpoints, since the layout is 'long'");
        if (data.Layout == ValueLayout.Long && data.Value is null)
            throw section.Absent("value", "the name of the column with the values, since the layout is 'long'");
        if (data.Layout == ValueLayout.SampleRows && data.Endpoint is not null)
            throw section.RefuseKey("endpoint", "the layout 'sample-rows' has no column of endpoints", "the key only with 'endpoint-rows' or 'long'", "Remove the key or state the layout.");
        if (data.Layout != ValueLayout.Long && data.Value is not null)
            throw section.RefuseKey("value", $"the layout '{layout}' has no column of values", "the key only with 'long'", "Remove the key or state the layout.");
        if (data.Layout == ValueLayout.Long && new HashSet<string?> { data.Sample, data.Endpoint, data.Value }.Count < 3)
            throw section.Refuse("value", "the same column is named twice", "three different columns in 'sample', 'endpoint' and 'value'");
    }
}
