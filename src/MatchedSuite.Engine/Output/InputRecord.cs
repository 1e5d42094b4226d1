using MatchedSuite.Engine.Running;
using MatchedSuite.Storage.Files;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>One input file of a run.</summary>
/// <param name="Part">Its part in the study: samples, values, dictionary.</param>
/// <param name="Path">Its path relative to the study file's folder, with forward slashes.</param>
/// <param name="Fingerprint">Its size and hash.</param>
internal sealed record InputRecord(string Part, string Path, FileFingerprint Fingerprint)
{
    /// <summary>Fingerprints every input of a study.</summary>
    public static IReadOnlyList<InputRecord> OfAll(StudyDefinition study, CancellationToken cancellation)
    {
        string folder = System.IO.Path.GetDirectoryName(study.Path)!;
        var records = new List<InputRecord>();
        foreach (var (part, path) in StudyInputs.FilesOf(study))
        {
            cancellation.ThrowIfCancellationRequested();
            records.Add(new InputRecord(part, System.IO.Path.GetRelativePath(folder, path).Replace('\\', '/'), FileFingerprint.Of(path)));
        }

        return records;
    }
}
