namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the section <c>design</c>.</summary>
internal static class DesignReading
{
    private const string ColumnName = "the name of a column";
    private const string CellText = "the text of a cell";

    /// <summary>The section, with every rule that lies within it.</summary>
    public static DesignSection Read(Section section, Capabilities capabilities)
    {
        DesignKind kind = section.Choice<DesignKind>("kind")
            ?? throw section.Absent("kind", "one of " + Listing.Of(WrittenName.All<DesignKind>()));
        section.Available("kind", kind, capabilities.Designs);
        capabilities = capabilities.For(kind);
        DesignRules.KeysOfKind(section, kind);
        var design = new DesignSection
        {
            Kind = kind,
            Set = section.Text("set", ColumnName),
            Subject = section.Text("subject", ColumnName),
            Role = Groups(section, "role"),
            Exposure = section.Inner("exposure")?.RequiredText("column", ColumnName),
            Visit = Order(section, "visit"),
            Contrasts = Contrasts(section, capabilities),
            Arm = Groups(section, "arm"),
            Period = Order(section, "period"),
            Treatment = Groups(section, "treatment"),
            Stratum = section.Text("stratum", ColumnName),
            Replicates = section.Choice<Replicates>("replicates") ?? Replicates.Refuse,
            ReuseAllowed = section.Named("reuse", ["refuse", "allowed"]) == "allowed",
            MatchOn = MatchOn(section),
            Covariates = section.Texts("covariates", "a list of names of columns") ?? [],
            PersonTime = section.Text("person-time", ColumnName),
        };
        DesignRules.Columns(section, design);
        section.AvailableKey("exposure", true, capabilities);
        section.AvailableKey("stratum", true, capabilities);
        section.AvailableKey("reuse", design.ReuseAllowed, capabilities);
        section.AvailableKey("covariates", design.Covariates.Count > 0, capabilities);
        section.AvailableKey("person-time", true, capabilities);
        section.Inner("visit")?.AvailableKey("window", true, capabilities);
        return design;
    }

    private static TwoGroups? Groups(Section section, string key)
    {
        if (section.Inner(key) is not { } inner)
            return null;
        var groups = new TwoGroups(
            inner.RequiredText("column", ColumnName), inner.RequiredText("index", CellText), inner.RequiredText("reference", CellText));
        return groups.Index != groups.Reference
            ? groups
            : throw inner.Refuse("reference", $"index and reference are both '{groups.Index}'", "two different cell texts");
    }

    private static OrderedGroups? Order(Section section, string key)
    {
        if (section.Inner(key) is not { } inner)
            return null;
        string column = inner.RequiredText("column", ColumnName);
        const string Expected = "a list of two or more cell texts, in order of time";
        var order = inner.Texts("order", Expected, fewest: 2) ?? throw inner.Absent("order", Expected);
        if (key == "period")
            return order.Count == 2 ? new OrderedGroups(column, order, null) : throw inner.Refuse("order", $"{order.Count} periods are listed", "the two periods of a crossover");
        string? reference = inner.Text("reference", CellText);
        if (reference is not null && !order.Contains(reference))
            throw inner.Refuse("reference", $"'{reference}' is not in the order", "one of " + Listing.Of(order));
        return new OrderedGroups(column, order, reference) { Window = Window(inner, order) };
    }

    private static VisitWindow? Window(Section visit, IReadOnlyList<string> order)
    {
        if (visit.Inner("window") is not { } window)
            return null;
        const string Expected = "a list of {visit, from, to}, one entry for each visit with limits";
        string column = window.RequiredText("column", "the name of the column with the day");
        var limits = new List<DayLimits>();
        foreach (Section entry in window.InnerList("limits") ?? throw window.Absent("limits", Expected))
        {
            string name = entry.RequiredText("visit", "one of " + Listing.Of(order));
            if (!order.Contains(name) || limits.Any(earlier => earlier.Visit == name))
                throw entry.Refuse("visit", $"'{name}' is not in the order, or has limits already", "one of " + Listing.Of(order) + ", each once");
            double from = entry.Real("from", _ => true, "a number of days") ?? throw entry.Absent("from", "a number of days");
            double to = entry.Real("to", _ => true, "a number of days") ?? throw entry.Absent("to", "a number of days");
            limits.Add(from <= to ? new DayLimits(name, from, to) : throw entry.Refuse("to", "the last day is before the first", "'from' not above 'to'"));
        }

        return limits.Count > 0 ? new VisitWindow(column, limits) : throw window.Refuse("limits", "the list is empty", Expected);
    }

    private static IReadOnlyList<VisitContrast> Contrasts(Section section, Capabilities capabilities)
    {
        if (section.Choices<VisitContrast>("contrasts") is not { } contrasts)
            return [VisitContrast.EachVsReference];
        section.Available("contrasts", contrasts, capabilities.Contrasts);
        return contrasts;
    }

    private static List<MatchRule> MatchOn(Section section)
    {
        var rules = new List<MatchRule>();
        foreach (Section entry in section.InnerList("match-on") ?? [])
        {
            string column = entry.RequiredText("column", ColumnName);
            if (rules.Any(rule => rule.Column == column))
                throw entry.Refuse("column", $"'{column}' stands in the list twice", "every column once", "Remove one of the two.");
            double? within = entry.Real("within", value => value >= 0, "the largest difference allowed, a number not below 0");
            bool? equal = entry.IsTrue("equal");
            if (equal == false)
                throw entry.Refuse("equal", "'equal: false' promises nothing", "'equal: true' or 'within'", "Remove the entry.");
            if (within is null == equal is null)
                throw entry.Refuse(within is null ? "column" : "within", within is null ? "neither 'within' nor 'equal' is written" : "both 'within' and 'equal' are written", "one of the two", "Write within: 2 for a number or equal: true for a category.");
            rules.Add(new MatchRule(column, within));
        }

        return rules;
    }
}
