using MatchedSuite.Storage;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Rules between the sections of a study file.</summary>
internal static class StudyRules
{
    /// <summary>Refuses a study whose sections contradict each other.</summary>
    /// <param name="root">The whole file.</param>
    /// <param name="study">What was read from it.</param>
    /// <exception cref="RefusalException">A group's cell text is read as missing; the key column serves another purpose; no method for the default kind.</exception>
    public static void Check(Section root, StudyDefinition study)
    {
        Section design = root.RequiredInner("design");
        RefuseMissingGroups(design, study);
        RefuseKeyColumn(design, study);
        EndpointKind kind = study.Endpoints.Kind;
        if (root.Inner("endpoints") is { } endpoints && endpoints.Has("kind") && !study.Analysis.Methods.ContainsKey(kind))
            throw endpoints.Refuse("kind", $"no method for {WrittenName.Of(kind)} endpoints in this design is available in this version", "one of what is available: " + Listing.Of(study.Analysis.Methods.Keys.Select(WrittenName.Of)));
    }

    private static void RefuseMissingGroups(Section design, StudyDefinition study)
    {
        var groups = new (string Key, string[] Texts)[]
        {
            ("role", Texts(study.Design.Role)), ("arm", Texts(study.Design.Arm)), ("treatment", Texts(study.Design.Treatment)),
            ("visit", [.. study.Design.Visit?.Order ?? []]), ("period", [.. study.Design.Period?.Order ?? []]),
        };
        foreach (var (key, texts) in groups)
        {
            if (Array.Find(texts, study.Data.Dialect.Missing.Contains) is { } text)
                throw design.Refuse(key, $"the cell text '{text}' is read as missing", "a text that is not in 'data.missing'", "Change data.missing or the value.");
        }
    }

    private static void RefuseKeyColumn(Section design, StudyDefinition study)
    {
        if (study.Data.Sample is not { } sample)
            return;
        foreach (var (key, column) in DesignRules.Links(study.Design))
        {
            // A person may give a single sample: then the sample's name is the person's.
            if (column == sample && key != "subject")
                throw design.Refuse(key, $"the column '{sample}' is the key of the sample sheet ('data.sample')", "a column of its own");
        }

        if (study.Design.Covariates.Contains(sample))
            throw design.Refuse("covariates", $"the column '{sample}' is the key of the sample sheet ('data.sample')", "columns with no other purpose");
    }

    private static string[] Texts(TwoGroups? groups) => groups is null ? [] : [groups.Index, groups.Reference];
}
