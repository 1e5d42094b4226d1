using System.Globalization;
using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Output;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Running;

/// <summary>Writes a finished run's pages for people into its folder, before it is committed.</summary>
public delegate void PageWriter(FinishedRun run, RunFolder folder);

/// <summary>Writes the page on the matching into a run's folder.</summary>
public delegate void AuditPageWriter(StudyInputs inputs, RunFolder folder);

/// <summary>The main job: from a study file to a folder of results.</summary>
public sealed class AnalysisRun
{
    private readonly StudyDefinition _study;
    private readonly RunOptions _options;
    private readonly IRunObserver _observer;
    private readonly RunFolder _folder;
    private readonly ExecutionRecord _execution;
    private readonly RunWarnings _warnings;

    private AnalysisRun(StudyDefinition study, RunOptions options, IRunObserver observer, RunFolder folder)
    {
        _study = study;
        _options = options;
        _observer = observer;
        _folder = folder;
        _execution = new ExecutionRecord(options.Threads, options.Memory);
        _warnings = new RunWarnings(options.Warnings, observer);
    }

    /// <summary>Reads, audits, tests, adjusts and writes; the folder appears whole or not at all.</summary>
    /// <param name="studyPath">Path of the study file.</param>
    /// <param name="options">What the command line decides.</param>
    /// <param name="auditPage">Writes the page on the matching.</param>
    /// <param name="pages">Writes the summary for people.</param>
    /// <param name="observer">Hears of steps, warnings and progress.</param>
    /// <param name="cancellation">Ends the run; nothing is left of it.</param>
    /// <exception cref="RefusalException">The study file or the data are refused.</exception>
    /// <exception cref="GateBrokenException">A gate is broken; the audit is written.</exception>
    /// <exception cref="FolderBusyException">Another run holds the output folder.</exception>
    public static FinishedRun Execute(
        string studyPath, RunOptions options, AuditPageWriter auditPage, PageWriter pages, IRunObserver observer, CancellationToken cancellation)
    {
        StudyDefinition study = options.Override(StudyReader.Read(studyPath, Available.InThisVersion));
        using RunFolder folder = RunFolder.Claim(study.Output.Folder, study.Output.Replace);
        return new AnalysisRun(study, options, observer, folder).Execute(auditPage, pages, cancellation);
    }

    private FinishedRun Execute(AuditPageWriter auditPage, PageWriter pages, CancellationToken cancellation)
    {
        Task<IReadOnlyList<InputRecord>> fingerprints = Task.Run(() => InputRecord.OfAll(_study, cancellation), cancellation);
        if (_study.Output.Report == true)
            _observer.Note("output.report: this version writes no report.html; summary.md is what a person reads first");
        _observer.Step($"reading {_study.Data.Samples}");
        using StudyInputs inputs = StudyInputs.Open(_study, _options, _folder.Partial);
        _warnings.Take(inputs.Audit.Warnings.Select(warning => warning.Text));
        using var audit = new SideTask(_options.Threads, () =>
        {
            AuditFiles.Write(_folder, inputs);
            auditPage(inputs, _folder);
        });
        _execution.StepDone("audit");
        RefuseBrokenGates(inputs, audit, fingerprints);

        _observer.Step($"testing the endpoints of {_study.Data.Values ?? _study.Data.Samples}");
        FinishedRun run = Analyse(inputs, cancellation);
        pages(run, _folder);
        audit.Finish();
        RunManifest.Write(_folder, run, fingerprints.GetAwaiter().GetResult(), _execution);
        cancellation.ThrowIfCancellationRequested();
        _folder.Commit();
        return run;
    }

    private FinishedRun Analyse(StudyInputs inputs, CancellationToken cancellation)
    {
        var plan = new AnalysisPlan(inputs);
        _warnings.Take(plan.Warnings);
        using var store = new ResultStore(_folder.Partial)
        {
            Differences = plan.Flips is { } flips ? new DifferenceStore(flips.Width, _options.MemoryForDifferences, _folder.Partial) : null,
        };
        EndpointStream stream = EndpointStream.Run(plan, inputs.Source, store, _options, _observer, cancellation);
        RefuseNoEndpoints(stream);
        WarnOfStream(stream, plan);
        Func<int, EndpointInfo> describe = endpoint => plan.Catalogue.Describe(stream.Names[endpoint]);
        var traits = new EndpointTraits(stream.Names.Count, describe);
        ModeratedFinish.Run(store.Rows, plan, traits.Family);
        _execution.StepDone("tests");
        _execution.Evaluation = stream.Evaluation;

        HypothesisTable table = HypothesisTable.Of(store.Rows, plan, traits);
        AdjustedColumns adjusted = Adjust(inputs.Source, store, plan, stream.Names, table, traits, cancellation);
        var tables = new ResultTables(store.Rows, adjusted, plan, describe);
        using var parquet = new SideTask(_options.Threads, () => tables.WriteParquet(_folder));
        using var details = new SideTask(_options.Threads, () =>
        {
            DetailTable.Write(_folder, store.Details, plan, stream.Names);
            TwinTable.Write(_folder, store.Details, plan, stream.Names);
        });
        tables.WriteCsv(_folder);
        SummaryOrder summary = tables.WriteSummary(_folder);
        tables.WriteUntested(_folder);
        IReadOnlyList<GuaranteedDiscoveries> guaranteed = new DiscoveryTables(plan, table, traits, stream.Names).Write(_folder);
        parquet.Finish();
        details.Finish();
        _execution.StepDone("tables");
        return new FinishedRun
        {
            Folder = _folder.Target,
            Plan = plan,
            Audit = inputs.Audit,
            Endpoints = stream.Names.Count,
            PrimaryRows = summary.Count,
            TestedRows = summary.Tested,
            Groups = adjusted.Groups,
            Guaranteed = guaranteed,
            Top = tables.Top(summary, _study.Output.Top),
            Warnings = _warnings.Texts,
            Cautions = Cautions.For(_study, plan.Arrangement, summary.SomeMissing),
        };
    }

    private AdjustedColumns Adjust(
        EndpointSource source, ResultStore store, AnalysisPlan plan, IReadOnlyList<string> names, HypothesisTable table, EndpointTraits traits,
        CancellationToken cancellation)
    {
        var adjuster = new RowAdjuster(plan, table, traits);
        adjuster.AdjustByP();
        _execution.StepDone("adjustment");
        if (store.Differences is { } differences)
        {
            _observer.Step("flipping whole sets");
            adjuster.AdjustByFlips(differences, _options.Threads, _options.MemoryForDifferences, cancellation);
            _execution.StepDone("resampling");
        }

        if (_study.Analysis.IntervalsOverEndpoints.Count > 0)
        {
            _observer.Step("finding intervals for the discoveries");
            var wanted = new IntervalPlan(plan, table, adjuster.Columns);
            IntervalPass.Run(plan, source, names, wanted, adjuster.Columns, _options, _observer, cancellation);
            ModeratedFinish.SetIntervals(store.Rows, plan, wanted, adjuster.Columns);
            _execution.StepDone("intervals");
        }

        return adjuster.Columns;
    }

    private void RefuseBrokenGates(StudyInputs inputs, SideTask audit, Task<IReadOnlyList<InputRecord>> fingerprints)
    {
        string[] gates = [.. inputs.Audit.BrokenGates.Select(GateBrokenException.Describe)];
        if (gates.Length == 0)
            return;
        audit.Finish();
        RunManifest.WriteAuditOnly(_folder, _study, gates, fingerprints.GetAwaiter().GetResult(), _execution);
        _folder.Commit();
        throw new GateBrokenException(gates, _folder.Target);
    }

    private void RefuseNoEndpoints(EndpointStream stream)
    {
        if (stream.Names.Count > 0)
            return;
        throw new RefusalException(
            Path.GetFileName(_study.Data.Values ?? _study.Data.Samples), "no endpoint is left to analyse", "at least one endpoint that endpoints.include names",
            "Look at endpoints.include and endpoints.exclude, and at the columns (rows) of the file.");
    }

    private void WarnOfStream(EndpointStream stream, AnalysisPlan plan)
    {
        var warnings = new List<string>();
        if (stream.UndefinedValues > 0)
        {
            warnings.Add(string.Create(
                CultureInfo.InvariantCulture,
                $"{plan.ValuesFile}: values that are zero or negative and have no logarithm or root count as missing: {stream.UndefinedValues} in "
                + $"{stream.EndpointsWithUndefinedValues} of {stream.Names.Count} endpoints, flagged 'transform-undefined'"));
        }

        warnings.AddRange(plan.Catalogue.Unmet(stream.Names));
        _warnings.Take(warnings);
    }
}
