using MatchedSuite.Storage.Tables;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Running;

/// <summary>The tables a study names, opened: the sample sheet read, the measurements ready to stream, the matching audited.</summary>
public sealed class StudyInputs : IDisposable
{

    private StudyInputs(
        StudyDefinition study, TextTable sheet, EndpointSource source, EndpointCatalogue catalogue, MatchingAudit audit)
    {
        Sheet = sheet;
        Study = study;
        Source = source;
        Catalogue = catalogue;
        Audit = audit;
    }

    /// <summary>The study.</summary>
    public StudyDefinition Study { get; }

    /// <summary>The sample sheet's linking columns.</summary>
    public TextTable Sheet { get; }

    /// <summary>The measurements.</summary>
    public EndpointSource Source { get; }

    /// <summary>What is known of the endpoints.</summary>
    public EndpointCatalogue Catalogue { get; }

    /// <summary>The matching.</summary>
    public MatchingAudit Audit { get; }

    /// <summary>The input files, in the order in which the manifest lists them, each with its part in the study.</summary>
    public static IReadOnlyList<(string Part, string Path)> FilesOf(StudyDefinition study)
    {
        var files = new List<(string, string)> { ("samples", study.Data.Samples) };
        if (study.Data.Values is { } values)
            files.Add(("values", values));
        if (study.Endpoints.Dictionary is { } dictionary)
            files.Add(("dictionary", dictionary));
        return files;
    }

    /// <summary>Opens and audits.</summary>
    /// <param name="study">The study.</param>
    /// <param name="options">Memory that may be held and threads that may read.</param>
    /// <param name="scratchFolder">Folder for scratch files.</param>
    public static StudyInputs Open(StudyDefinition study, RunOptions options, string scratchFolder)
    {
        IReadOnlySet<string> linking = LinkingColumns.Of(study);
        TextTable sheet = TextTable.Read(study.Data.Samples, study.Data.Dialect, linking.Contains);
        EndpointCatalogue catalogue = EndpointCatalogue.Read(study);
        EndpointSource source = EndpointSource.Open(SourceOptions(study, linking, options, scratchFolder));
        try
        {
            MatchingAudit audit = MatchingAudit.Of(study, sheet, study.Data.Values is null ? null : source.Samples);
            return new StudyInputs(study, sheet, source, catalogue, audit);
        }
        catch
        {
            source.Dispose();
            throw;
        }
    }

    /// <summary>Columns of the sheet as numbers over the used samples.</summary>
    public SheetNumbers Numbers => new(Sheet, Study.Data.Dialect, Audit.Arrangement);

    /// <summary>Columns of the sheet as numbers over some of its rows.</summary>
    public SheetNumbers NumbersOf(int[] rows) => new(Sheet, Study.Data.Dialect, rows);

    /// <summary>Where the used samples stand in the file of measurements, in the order of the arrangement's rows.</summary>
    public int[] SourceColumns()
    {
        if (Study.Data.Values is null)
            return Audit.Arrangement.Rows;
        var positions = new Dictionary<string, int>(StringComparer.Ordinal);
        for (int position = 0; position < Source.Samples.Count; position++)
            positions.Add(Source.Samples[position], position);
        string?[] names = Sheet[Study.Data.Sample!];
        return [.. Audit.Arrangement.Rows.Select(row => positions[names[row]!])];
    }

    /// <inheritdoc/>
    public void Dispose() => Source.Dispose();

    private static EndpointSourceOptions SourceOptions(
        StudyDefinition study, IReadOnlySet<string> linking, RunOptions options, string scratchFolder) => new()
        {
            Path = study.Data.Values ?? study.Data.Samples,
            Layout = study.Data.Layout,
            SampleColumn = study.Data.Sample,
            EndpointColumn = study.Data.Endpoint,
            OtherColumns = linking,
            Dialect = study.Data.Dialect,
            Memory = options.Memory / 2,
            Threads = options.Threads,
            ScratchFolder = scratchFolder,
        };
}
