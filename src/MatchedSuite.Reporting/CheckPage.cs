using System.Text;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Reporting;

/// <summary>What <c>check</c> prints: what would be run.</summary>
public static class CheckPage
{
    /// <summary>The study in lines of name and value.</summary>
    public static string Text(StudyCheck check)
    {
        StudyDefinition study = check.Study;
        var lines = new List<(string Name, string Value)>
        {
            ("study", study.Name),
            ("samples", $"{study.Data.Samples} ({NumberText.Count(check.SheetColumns)} columns)"),
            ("values", $"{study.Data.Values ?? study.Data.Samples} ({WrittenName.Of(study.Data.Layout)}, {check.ValuesShape})"),
            ("design", WrittenName.Of(study.Design.Kind)),
        };
        if (study.Design.Role is { } role)
            lines.Add(("contrast", $"{role.Column}: '{role.Index}' compared with '{role.Reference}' within {study.Design.Set}"));
        lines.AddRange(DesignLines.Of(study.Design));
        if (study.Design.Stratum is { } stratum)
            lines.Add(("strata", stratum));
        if (study.Design.Covariates.Count > 0)
            lines.Add(("covariates", string.Join(", ", study.Design.Covariates)));
        foreach (var (kind, methods) in study.Analysis.Methods.OrderBy(of => of.Key))
            lines.Add(($"{WrittenName.Of(kind)} endpoints", string.Join(", ", methods)));
        lines.Add(("adjustments", $"{string.Join(", ", study.Analysis.Adjust)} over {WrittenName.Of(study.Analysis.Family)}"));
        lines.Add(("results", study.Output.Folder));
        int width = lines.Max(line => line.Name.Length);
        var text = new StringBuilder();
        foreach (var (name, value) in lines)
            text.Append(name.PadRight(width)).Append("  ").Append(value).Append('\n');
        return text.ToString();
    }
}
