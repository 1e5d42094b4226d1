using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;
namespace MatchedSuite.Reporting;
/// <summary>tmp</summary>
public static class MatchingPage
{
    /// <summary>tmp</summary>
    public static string Text(StudyDefinition study, MatchingAudit audit) => study.Name + audit.Dispositions.Length;
}
