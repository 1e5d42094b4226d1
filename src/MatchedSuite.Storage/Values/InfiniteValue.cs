using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Values;

/// <summary>An infinite value in a number column: no estimate survives it, so it is refused by name.</summary>
internal static class InfiniteValue
{
    public static RefusalException Refusal(string path, string endpoint, string sample) =>
        new($"{InputFile.ShortName(path)}, endpoint '{endpoint}', sample '{sample}'", "the value is infinite", "a finite number or null",
            "Correct the value, or write null for a missing one.");
}
