using MatchedSuite.Engine.Methods;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Planning;

/// <summary>The comparisons that a study of visits asks for, and which of its methods make them.</summary>
public static class VisitComparisons
{
    /// <summary>The comparisons in the order of the study file; one that follows from two entries is made once.</summary>
    public static IReadOnlyList<VisitComparison> Of(DesignSection design) =>
        [.. design.Contrasts.SelectMany(contrast => Of(contrast, design.Visit!)).DistinctBy(comparison => (comparison.Form, comparison.Index, comparison.Reference))];

    /// <summary>The methods named for a kind of endpoint that make a comparison; the first is its primary method.</summary>
    public static IReadOnlyList<string> MethodsFor(StudyDefinition study, EndpointKind kind, VisitForms form) =>
        study.Analysis.Methods.TryGetValue(kind, out IReadOnlyList<string>? names)
            ? [.. names.Where(name => VisitMethodTable.FormsOf(name).HasFlag(form))]
            : [];

    /// <summary>The primary methods of a kind of endpoint over all comparisons.</summary>
    public static IEnumerable<string> PrimaryMethods(StudyDefinition study, EndpointKind kind) =>
        Of(study.Design).Select(comparison => MethodsFor(study, kind, comparison.Form)).Where(names => names.Count > 0).Select(names => names[0]).Distinct();

    /// <summary>Refuses a comparison that none of the methods named for a kind of endpoint makes although there are some that do.</summary>
    /// <returns>One sentence for each kind and comparison that no method at all can make.</returns>
    /// <exception cref="RefusalException">Names the methods that would do.</exception>
    public static IReadOnlyList<string> Check(StudyDefinition study, EndpointCatalogue catalogue)
    {
        var sentences = new List<string>();
        if (study.Design.Kind != DesignKind.Visits)
            return sentences;
        foreach (EndpointKind kind in catalogue.Kinds.Where(study.Analysis.Methods.ContainsKey).Order())
        {
            foreach (VisitComparison comparison in Of(study.Design).DistinctBy(comparison => comparison.Form))
            {
                if (MethodsFor(study, kind, comparison.Form).Count > 0)
                    continue;
                string[] suitable = [.. VisitMethodTable.NamesFor(kind).Where(name => VisitMethodTable.FormsOf(name).HasFlag(comparison.Form))];
                if (suitable.Length == 0)
                    sentences.Add($"no method compares {WrittenName.Of(kind)} endpoints by '{comparison.Name}'; they have no row for it.");
                else
                    throw Refusal(study, kind, comparison, suitable);
            }
        }

        return sentences;
    }

    private static RefusalException Refusal(StudyDefinition study, EndpointKind kind, VisitComparison comparison, string[] suitable)
    {
        string key = $"analysis.{WrittenName.Of(kind)}";
        return new RefusalException(
            $"{Path.GetFileName(study.Path)}, {key}",
            $"none of {Quoted(study.Analysis.Methods[kind])} makes the comparison '{comparison.Name}' of design.contrasts",
            $"one of {Quoted(suitable)} among the methods",
            $"Add one to {key}, or remove the comparison from design.contrasts.");
    }

    private static string Quoted(IEnumerable<string> names) => string.Join(", ", names.Select(name => $"'{name}'"));

    private static IEnumerable<VisitComparison> Of(VisitContrast contrast, OrderedGroups visits)
    {
        int[] all = [.. Enumerable.Range(0, visits.Order.Count)];
        VisitComparison Difference(int index, int reference) =>
            new($"{visits.Order[index]}-{visits.Order[reference]}", VisitForms.Difference, index, reference);
        return contrast switch
        {
            VisitContrast.EachVsReference => all.Where(visit => visit != visits.ReferencePosition).Select(visit => Difference(visit, visits.ReferencePosition)),
            VisitContrast.Successive => all.Skip(1).Select(visit => Difference(visit, visit - 1)),
            VisitContrast.Trend => [new VisitComparison(WrittenName.Of(contrast), VisitForms.Trend, 0, 0)],
            _ => [new VisitComparison(WrittenName.Of(contrast), VisitForms.Omnibus, 0, 0)],
        };
    }
}
