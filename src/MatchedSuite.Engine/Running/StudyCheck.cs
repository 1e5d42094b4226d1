using System.Globalization;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Running;

/// <summary>A study file and the headers of its data, validated without reading a value.</summary>
public sealed record StudyCheck
{
    /// <summary>The study.</summary>
    public required StudyDefinition Study { get; init; }

    /// <summary>Columns of the sample sheet.</summary>
    public required int SheetColumns { get; init; }

    /// <summary>What the header of the measurements tells of their extent, in words.</summary>
    public required string ValuesShape { get; init; }

    /// <summary>What looks odd but does not stop a run.</summary>
    public required IReadOnlyList<string> Warnings { get; init; }

    /// <summary>Validates.</summary>
    /// <exception cref="RefusalException">The study file is wrong, or a file or column it names is not there.</exception>
    public static StudyCheck Run(string studyPath)
    {
        StudyDefinition study = StudyReader.Read(studyPath, Available.InThisVersion);
        IReadOnlyList<string> sheet = TextTable.ReadHeader(study.Data.Samples, study.Data.Dialect);
        foreach (string column in LinkingColumns.Of(study))
            ColumnNames.Find(study.Data.Samples, sheet, column);
        EndpointCatalogue catalogue = EndpointCatalogue.Read(study);
        IReadOnlyList<string> unmade = VisitComparisons.Check(study, catalogue);
        if (study.Design.Kind == DesignKind.ChangeByArm)
            ArmsDesign.Check(study, catalogue);
        AdjustmentRules.Check(study, catalogue);
        string shape = study.Data.Values is { } values
            ? ShapeOf(study, catalogue, values, TextTable.ReadHeader(values, study.Data.Dialect))
            : SampleRowsShape(study, catalogue, sheet);
        return new StudyCheck { Study = study, SheetColumns = sheet.Count, ValuesShape = shape, Warnings = [.. catalogue.Warnings, .. unmade] };
    }

    private static string ShapeOf(StudyDefinition study, EndpointCatalogue catalogue, string path, IReadOnlyList<string> header)
    {
        if (study.Data.Layout == ValueLayout.SampleRows)
        {
            ColumnNames.Find(path, header, study.Data.Sample!);
            return SampleRowsShape(study, catalogue, header);
        }

        ColumnNames.Find(path, header, study.Data.Endpoint ?? header[0]);
        return string.Create(CultureInfo.InvariantCulture, $"{header.Count - 1} samples");
    }

    private static string SampleRowsShape(StudyDefinition study, EndpointCatalogue catalogue, IReadOnlyList<string> header)
    {
        IReadOnlySet<string> linking = LinkingColumns.Of(study);
        int endpoints = header.Count(column => !linking.Contains(column) && catalogue.Wanted(column));
        return string.Create(CultureInfo.InvariantCulture, $"{endpoints} endpoints");
    }
}
