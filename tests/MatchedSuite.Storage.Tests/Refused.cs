namespace MatchedSuite.Storage.Tests;

/// <summary>Asserts that something is refused with the place, the finding and the expectation that a user must see.</summary>
internal static class Refused
{
    public static RefusalException By(Action action, string where, string found, string expected)
    {
        var refusal = Assert.Throws<RefusalException>(action);
        Assert.Equal(where, refusal.Where);
        Assert.Equal(found, refusal.Found);
        Assert.Contains(expected, refusal.Expected, StringComparison.Ordinal);
        return refusal;
    }
}
