using System.Globalization;
using System.Text;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Reporting;

/// <summary><c>audit/matching.md</c>: how the sets came about, from the rows read to the rows used. It contains identifiers.</summary>
public static class MatchingPage
{
    /// <summary>The page.</summary>
    public static string Text(StudyDefinition study, MatchingAudit audit)
    {
        var page = new StringBuilder();
        page.Append(Invariant($"# Matching of {study.Name}\n\n"));
        page.Append(Invariant($"Sample sheet `{Path.GetFileName(study.Data.Samples)}`, design `{WrittenName.Of(study.Design.Kind)}`. "));
        page.Append("This page contains identifiers; docs/matching.md explains every term.\n");
        Add(page, "From rows read to rows used", Flow(audit));
        if (audit.Patterns is null)
            Add(page, "Sets by shape", Shapes(audit));
        foreach (var (heading, body) in PlaceSections.Of(audit))
            Add(page, heading, body);
        if (audit.Arrangement.Strata.Length > 0)
            Add(page, "Used sets by stratum", Strata(audit.Arrangement));
        if (audit.Balance.Length > 0)
            AddBalance(page, audit);
        AddGates(page, study.Gates, audit);
        if (audit.Warnings.Length > 0)
            Add(page, "Warnings", string.Concat(audit.Warnings.Select(warning => $"- {warning.Text} (`{warning.Code}`)\n")));
        return page.ToString();
    }

    private static string Flow(MatchingAudit audit)
    {
        int left = audit.Dispositions.Length;
        var table = new MarkdownTable("step", ">rows", ">left");
        table.Row("read", Count(left), Count(left));
        foreach (DispositionCount count in audit.Counts)
        {
            if (count.Disposition == Disposition.Used || count.Rows == 0)
                continue;
            left -= count.Rows;
            table.Row(WrittenName.Of(count.Disposition), "−" + Count(count.Rows), Count(left));
        }

        int used = audit.Counts.Single(count => count.Disposition == Disposition.Used).Rows;
        return table.Row(WrittenName.Of(Disposition.Used), Count(used), Count(left)).ToString();
    }

    private static string Shapes(MatchingAudit audit)
    {
        var table = new MarkdownTable(">index samples", ">reference samples", ">sets");
        foreach (SetShape shape in audit.Shapes)
            table.Row(Count(shape.Index), Count(shape.Reference), Count(shape.Sets));
        return Invariant($"{table}\n{audit.Shapes.Sum(shape => shape.Sets)} sets have a sample that can be used; {audit.Arrangement.Sets.Length} sets are used.\n");
    }

    private static string Strata(Arrangement arrangement)
    {
        var table = new MarkdownTable("stratum", ">sets");
        for (int stratum = 0; stratum < arrangement.Strata.Length; stratum++)
            table.Row(arrangement.Strata[stratum], Count(arrangement.StratumOfSet.Count(of => of == stratum)));
        return table.ToString();
    }

    private static void AddBalance(StringBuilder page, MatchingAudit audit)
    {
        var agreement = new MarkdownTable("variable", "promise", ">sets compared", ">not known", ">agree");
        foreach (MatchBalance balance in audit.Balance)
            agreement.Row(balance.Column, balance.Promise, Count(balance.Sets), Count(balance.Unknown), Count(balance.Agreeing));
        Add(page, "Balance of the used sets", agreement.ToString());
        MatchBalance[] numeric = [.. audit.Balance.Where(balance => balance.Numbers is not null)];
        if (numeric.Length > 0)
            page.Append('\n').Append(Numbers(numeric));
        if (audit.Breaches.Length == 0)
        {
            Add(page, "Sets outside match-on", "No complete set breaks a promise of the matching.\n");
            return;
        }

        var breaches = new MarkdownTable("set", "variable", "promise", ">index", ">reference");
        foreach (ToleranceBreach breach in audit.Breaches)
            breaches.Row(breach.Set, breach.Column, breach.Promise, breach.Index, breach.Reference);
        Add(page, "Sets outside match-on", breaches.ToString());
    }

    private static MarkdownTable Numbers(MatchBalance[] balances)
    {
        var table = new MarkdownTable("variable", ">index mean (SD)", ">reference mean (SD)", ">mean difference", ">largest", ">standardised");
        foreach (MatchBalance balance in balances)
        {
            NumberBalance numbers = balance.Numbers!;
            table.Row(
                balance.Column,
                $"{NumberText.Quantity(numbers.IndexMean)} ({NumberText.Quantity(numbers.IndexSd)})",
                $"{NumberText.Quantity(numbers.ReferenceMean)} ({NumberText.Quantity(numbers.ReferenceSd)})",
                NumberText.Quantity(numbers.MeanDifference),
                NumberText.Quantity(numbers.LargestDifference),
                NumberText.Quantity(numbers.StandardisedDifference));
        }

        return table;
    }

    private static void AddGates(StringBuilder page, GateSection gates, MatchingAudit audit)
    {
        var table = new MarkdownTable("gate", "found", "allowed", "result");
        if (gates.UnmatchedAtMost is { } most)
        {
            string found = Invariant($"{audit.RowsUnmatched} of {audit.RowsOfInterest} samples without a complete set");
            table.Row("unmatched-at-most", found, Invariant($"at most {100 * most:0.##}%"), Result(audit, "unmatched-at-most"));
        }

        int outside = audit.Breaches.Select(breach => breach.Set).Distinct().Count();
        if (audit.Patterns is null)
            table.Row("tolerance", outside == 1 ? "1 set outside match-on" : $"{Count(outside)} sets outside match-on", WrittenName.Of(gates.Tolerance), ToleranceResult(gates.Tolerance, outside, audit));
        if (audit.Patterns is null || gates.UnmatchedAtMost is not null)
            Add(page, "Gates", table.ToString());
        if (gates.MissingAtMost is { } missing)
            page.Append(Invariant($"\n`missing-at-most` ({100 * missing:0.##}%) is held endpoint by endpoint, in a run that reads the values.\n"));
    }

    private static string ToleranceResult(Tolerance tolerance, int outside, MatchingAudit audit) =>
        (tolerance, outside) switch
        {
            (Tolerance.Refuse, _) => Result(audit, "tolerance"),
            (_, 0) => "held",
            (Tolerance.Drop, _) => "left out and listed",
            _ => "used and listed",
        };

    private static string Result(MatchingAudit audit, string gate) => audit.BrokenGates.Any(broken => broken.Gate == gate) ? "**broken**" : "held";

    private static void Add(StringBuilder page, string heading, string body) => page.Append("\n## ").Append(heading).Append("\n\n").Append(body);

    private static string Count(int value) => value.ToString(CultureInfo.InvariantCulture);

    private static string Invariant(FormattableString text) => FormattableString.Invariant(text);
}
