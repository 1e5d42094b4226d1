using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests.Definition;

/// <summary>Every column that the study names is no endpoint.</summary>
public class LinkingColumnsTests
{
    [Theory]
    [InlineData(StudyTexts.Pairs, "sample_id", "twin_pair", "participant", "shift_work", "zygosity", "age", "sex", "bmi", "smoking", "years")]
    [InlineData(StudyTexts.Visits, "id", "participant", "visit", "day")]
    [InlineData(StudyTexts.ChangeByArm, "participant", "visit", "arm")]
    [InlineData(StudyTexts.Crossover, "participant", "period", "treatment")]
    [InlineData(StudyTexts.Exposure, "pair", "hours")]
    public void They_are_all_there(string text, params string[] columns) =>
        Assert.Equal(columns.Order(), LinkingColumns.Of(StudyFolder.Read(text)).Order());
}
