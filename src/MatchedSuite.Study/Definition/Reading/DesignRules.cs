namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Which keys a kind of design needs and which it cannot have, and which columns may not coincide.</summary>
internal static class DesignRules
{
    private static readonly Dictionary<DesignKind, string[]> Needed = new()
    {
        [DesignKind.Pairs] = ["set"],
        [DesignKind.Sets] = ["set", "role"],
        [DesignKind.Visits] = ["subject", "visit"],
        [DesignKind.ChangeByArm] = ["subject", "visit", "arm"],
        [DesignKind.Crossover] = ["subject", "period", "treatment"],
    };

    private static readonly Dictionary<string, DesignKind[]> OnlyFor = new()
    {
        ["set"] = [DesignKind.Pairs, DesignKind.Sets],
        ["role"] = [DesignKind.Pairs, DesignKind.Sets],
        ["exposure"] = [DesignKind.Pairs],
        ["visit"] = [DesignKind.Visits, DesignKind.ChangeByArm],
        ["contrasts"] = [DesignKind.Visits],
        ["arm"] = [DesignKind.ChangeByArm],
        ["period"] = [DesignKind.Crossover],
        ["treatment"] = [DesignKind.Crossover],
        ["reuse"] = [DesignKind.Sets],
        ["match-on"] = [DesignKind.Pairs, DesignKind.Sets],
    };

    /// <summary>Refuses a missing key of the kind and a key of another kind.</summary>
    public static void KeysOfKind(Section section, DesignKind kind)
    {
        string name = WrittenName.Of(kind);
        foreach (var (key, kinds) in OnlyFor)
        {
            if (section.Has(key) && !kinds.Contains(kind))
            {
                string of = Listing.Of(kinds.Select(WrittenName.Of));
                throw section.RefuseKey(key, $"a design of kind '{name}' has no '{key}'", $"the key only with kind {of}", "Remove the key or change the kind.");
            }
        }

        foreach (string key in Needed[kind])
        {
            if (!section.Has(key))
                throw section.Absent(key, $"the key, since the kind is '{name}'");
        }

        if (kind != DesignKind.Pairs || section.Has("role") != section.Has("exposure"))
            return;
        if (section.Has("role"))
            throw section.RefuseKey("exposure", "both 'role' and 'exposure' are written", "one of the two", "Keep 'role' for two groups or 'exposure' for a measured exposure.");
        throw section.Absent("role", "'role' or 'exposure', since the kind is 'pairs'", "Write role: {column: …, index: …, reference: …}.");
    }

    /// <summary>Refuses a column that serves two purposes that exclude each other.</summary>
    public static void Columns(Section section, DesignSection design)
    {
        var purposes = new Dictionary<string, string>();
        foreach (var (key, column) in Links(design))
        {
            // A set of pairs that is a person, before and after, is written as set and subject both.
            bool personIsSet = key == "subject" && column == design.Set && design.Kind == DesignKind.Pairs;
            if (column is not null && !personIsSet && !purposes.TryAdd(column, key))
                throw section.Refuse(key, $"the column '{column}' is already the {purposes[column]}", "a column of its own");
        }

        foreach (string covariate in design.Covariates)
        {
            if (purposes.TryGetValue(covariate, out string? purpose))
                throw section.Refuse("covariates", $"the column '{covariate}' is already the {purpose}", "columns with no other purpose", "Remove it from the list.");
        }

        foreach (MatchRule rule in design.MatchOn)
        {
            if (rule.Column != design.Stratum && purposes.TryGetValue(rule.Column, out string? purpose))
                throw section.Refuse("match-on", $"the column '{rule.Column}' is already the {purpose}", "columns that the matching was done on", "Remove it from the list.");
        }
    }

    /// <summary>The design's columns that link samples or name groups, by key; those not used are null.</summary>
    public static IEnumerable<(string Key, string? Column)> Links(DesignSection design) =>
    [
        ("set", design.Set), ("subject", design.Subject), ("role", design.Role?.Column), ("exposure", design.Exposure),
        ("visit", design.Visit?.Column), ("arm", design.Arm?.Column), ("period", design.Period?.Column),
        ("treatment", design.Treatment?.Column), ("stratum", design.Stratum), ("person-time", design.PersonTime),
    ];
}
