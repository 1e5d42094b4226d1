using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Output;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Running;

/// <summary>The matching audit alone: no endpoint is tested, and nothing is written unless a folder is named.</summary>
public static class AuditRun
{
    /// <summary>Reads the sample sheet and audits the matching.</summary>
    /// <param name="studyPath">Path of the study file.</param>
    /// <param name="options">What the command line decides; its folder, if any, receives the audit.</param>
    /// <param name="page">Writes the page on the matching.</param>
    /// <param name="observer">Hears of steps and warnings.</param>
    /// <param name="cancellation">Ends the audit; nothing is left of it.</param>
    /// <exception cref="RefusalException">The study file or the data are refused.</exception>
    /// <exception cref="FolderBusyException">Another run holds the output folder.</exception>
    public static FinishedAudit Execute(
        string studyPath, RunOptions options, AuditPageWriter page, IRunObserver observer, CancellationToken cancellation)
    {
        StudyDefinition study = options.Override(StudyReader.Read(studyPath, Available.InThisVersion));
        observer.Step($"reading {study.Data.Samples}");
        var execution = new ExecutionRecord(options.Threads, options.Memory);
        using StudyInputs inputs = StudyInputs.Open(study, options, Path.GetTempPath());
        new RunWarnings(options.Warnings, observer).Take(inputs.Audit.Warnings.Select(warning => warning.Text));
        cancellation.ThrowIfCancellationRequested();
        if (options.Folder is not null)
            Write(study, inputs, page, execution, cancellation);
        return new FinishedAudit(study, inputs.Audit, options.Folder is null ? null : study.Output.Folder);
    }

    private static void Write(
        StudyDefinition study, StudyInputs inputs, AuditPageWriter page, ExecutionRecord execution, CancellationToken cancellation)
    {
        using RunFolder folder = RunFolder.Claim(study.Output.Folder, study.Output.Replace);
        AuditFiles.Write(folder, inputs);
        page(inputs, folder);
        string[] gates = [.. inputs.Audit.BrokenGates.Select(GateBrokenException.Describe)];
        RunManifest.WriteAuditOnly(folder, study, gates, InputRecord.OfAll(study, cancellation), execution);
        folder.Commit();
    }
}

/// <summary>An audit that is done.</summary>
/// <param name="Study">The study.</param>
/// <param name="Audit">The matching.</param>
/// <param name="Folder">Where it was written; null where no folder was named.</param>
public sealed record FinishedAudit(StudyDefinition Study, MatchingAudit Audit, string? Folder);
