using MatchedSuite.Statistics;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests.Definition;

/// <summary>Everything that is written arrives in the definition; what is not written has the documented default.</summary>
public class StudyReaderTests
{
    [Fact]
    public void Every_key_of_a_full_study_of_pairs_arrives()
    {
        using var folder = new StudyFolder();
        StudyDefinition study = StudyReader.Read(folder.Write("study.yaml", StudyTexts.Pairs), Capabilities.Everything);
        Assert.Equal(("Harbour twins", "Do co-twins who work night shifts differ?", 20260301L), (study.Name, study.Question, study.Seed));
        Assert.Equal(StudyTexts.Pairs, study.Text);
        Assert.Equal(Path.Combine(folder.Path, "samples.csv"), study.Data.Samples);
        Assert.Equal(Path.Combine(folder.Path, "panel.parquet"), study.Data.Values);
        Assert.Equal(("sample_id", ValueLayout.EndpointRows, "marker"), (study.Data.Sample, study.Data.Layout, study.Data.Endpoint));
        Assert.Equal((';', ','), (study.Data.Dialect.Delimiter, study.Data.Dialect.DecimalMark));
        Assert.Equal(["", "NA", "-"], study.Data.Dialect.Missing);
        DesignSection design = study.Design;
        Assert.Equal((DesignKind.Pairs, "twin_pair", "participant", "zygosity", Replicates.Mean), (design.Kind, design.Set, design.Subject, design.Stratum, design.Replicates));
        Assert.Equal([new MatchRule("age", 2), new MatchRule("sex", null)], design.MatchOn);
        Assert.Equal(["bmi", "smoking"], design.Covariates);
        Assert.Equal("years", design.PersonTime);
        EndpointSection endpoints = study.Endpoints;
        Assert.Equal(Path.Combine(folder.Path, "endpoints.csv"), endpoints.Dictionary);
        Assert.Equal(["crp*", "il6"], endpoints.Include);
        Assert.Equal(["crp_old"], endpoints.Exclude);
        Assert.Equal((EndpointKind.Binary, Transform.Log2, BelowLimit.Root2, true), (endpoints.Kind, endpoints.Transform, endpoints.BelowLimit, endpoints.PerStandardDeviation));
        Assert.Equal((0.05, Tolerance.Drop, 0.5), (study.Gates.UnmatchedAtMost, study.Gates.Tolerance, study.Gates.MissingAtMost));
        OutputSection output = study.Output;
        Assert.Equal(Path.Combine(folder.Path, "results"), output.Folder);
        Assert.Equal((false, (bool?)false, 10, true), (output.Replace, output.Report, output.Top, output.IdentifiersShown));
    }

    [Fact]
    public void Every_key_of_a_full_analysis_arrives()
    {
        AnalysisSection analysis = StudyFolder.Read(StudyTexts.Pairs).Analysis;
        Assert.Equal(["paired-t", "signed-rank"], analysis.Methods[EndpointKind.Continuous]);
        Assert.Equal(["mcnemar-exact"], analysis.Methods[EndpointKind.Binary]);
        Assert.Equal((Sides.Greater, 0.9, FamilyRule.ByFamily), (analysis.Sides, analysis.Confidence, analysis.Family));
        Assert.Equal(["holm", "bh"], analysis.Adjust);
        Assert.Equal((0.01, 0.1, 999, 5), (analysis.Alpha, analysis.Fdr, analysis.Resamples, analysis.MinimumSets));
        Assert.Equal(ZeroRule.Pratt, analysis.Zeros);
        Assert.Equal([IntervalKind.Fcr, IntervalKind.Simultaneous], analysis.Intervals);
        Assert.Equal(new SensitivitySection { Gamma = true, EValue = true }, analysis.Sensitivity);
        Assert.Equal(0.1, analysis.EquivalenceMargin);
    }

    [Fact]
    public void The_keys_of_the_other_designs_arrive()
    {
        Assert.True(StudyFolder.Read(StudyTexts.Sets).Design.ReuseAllowed);
        StudyDefinition visits = StudyFolder.Read(StudyTexts.Visits);
        Assert.Equal(["baseline", "month6", "year1"], visits.Design.Visit!.Order);
        Assert.Equal([new DayLimits("month6", 150, 210)], visits.Design.Visit.Window!.Limits);
        Assert.Equal([VisitContrast.EachVsReference, VisitContrast.Omnibus], visits.Design.Contrasts);
        Assert.True(visits.Analysis.AcrossContrasts);
        Assert.Equal(("marker", "result"), (visits.Data.Endpoint, visits.Data.Value));
        Assert.Equal(new TwoGroups("arm", "active", "placebo"), StudyFolder.Read(StudyTexts.ChangeByArm).Design.Arm);
        DesignSection crossover = StudyFolder.Read(StudyTexts.Crossover).Design;
        Assert.Equal(["1", "2"], crossover.Period!.Order);
        Assert.Equal(new TwoGroups("treatment", "A", "B"), crossover.Treatment);
        Assert.Equal("hours", StudyFolder.Read(StudyTexts.Exposure).Design.Exposure);
    }

    [Fact]
    public void What_is_not_written_has_the_documented_default()
    {
        StudyDefinition study = StudyFolder.Read(StudyTexts.Sets);
        Assert.Equal((1L, null, null, ValueLayout.SampleRows), (study.Seed, study.Question, study.Data.Sample, study.Data.Layout));
        Assert.Equal(["", "NA", "NaN", "."], study.Data.Dialect.Missing);
        Assert.Equal((null, '.'), (study.Data.Dialect.Delimiter, study.Data.Dialect.DecimalMark));
        Assert.Equal(Replicates.Refuse, study.Design.Replicates);
        Assert.Equal(["*"], study.Endpoints.Include);
        Assert.Equal(["conditional-logistic"], study.Analysis.Methods[EndpointKind.Continuous]);
        Assert.Equal(["holm", "bh"], study.Analysis.Adjust);
        Assert.Equal((0.95, 0.05, 0.05, 9999, 3), (study.Analysis.Confidence, study.Analysis.Alpha, study.Analysis.Fdr, study.Analysis.Resamples, study.Analysis.MinimumSets));
        Assert.Equal("out", Path.GetFileName(study.Output.Folder));
        Assert.Equal((true, (bool?)null, 25, false), (study.Output.Replace, study.Output.Report, study.Output.Top, study.Output.IdentifiersShown));
    }

    [Theory]
    [InlineData("index: yes, reference: no", "yes", "no")]
    [InlineData("index: \"yes\", reference: 'no'", "yes", "no")]
    [InlineData("index: 1, reference: 0", "1", "0")]
    [InlineData("index: 1.0, reference: 0.50", "1.0", "0.50")]
    [InlineData("index: true, reference: False", "true", "False")]
    [InlineData("index: \" case \", reference: control", "case", "control")]
    public void A_role_is_the_text_as_it_is_written(string written, string index, string reference)
    {
        TwoGroups role = StudyFolder.Read(StudyTexts.Pairs.With("index: yes, reference: no", written)).Design.Role!;
        Assert.Equal((index, reference), (role.Index, role.Reference));
    }

    [Theory]
    [InlineData("5%", 0.05)]
    [InlineData("0.05", 0.05)]
    [InlineData("12.5 %", 0.125)]
    [InlineData("0", 0.0)]
    [InlineData("100%", 1.0)]
    public void A_share_is_written_as_a_number_or_in_percent(string written, double share)
    {
        Assert.Equal(share, StudyFolder.Read(StudyTexts.Pairs.With("unmatched-at-most: 5%", "unmatched-at-most: " + written)).Gates.UnmatchedAtMost);
    }

    [Fact]
    public void A_measured_exposure_has_its_own_method()
    {
        var methods = StudyFolder.Read(StudyTexts.Exposure).Analysis.Methods;
        Assert.Equal(["within-pair-slope"], methods[EndpointKind.Continuous]);
        Assert.False(methods.ContainsKey(EndpointKind.Binary));
    }

    [Fact]
    public void A_byte_order_mark_and_carriage_returns_change_nothing()
    {
        using var folder = new StudyFolder();
        string path = Path.Combine(folder.Path, "study.yaml");
        File.WriteAllText(path, StudyTexts.Pairs.ReplaceLineEndings("\r\n"), new System.Text.UTF8Encoding(encoderShouldEmitUTF8Identifier: true));
        Assert.Equal("Harbour twins", StudyReader.Read(path, Capabilities.Everything).Name);
    }
}
