using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Roles in a design with a measured exposure: the first and the second member of a set; a slope does not depend on which is which.</summary>
internal static class ExposureRoles
{
    private const string First = "first";
    private const string Second = "second";

    /// <summary>The two roles, named by their order in the sheet.</summary>
    public static TwoGroups Groups(string exposure) => new(exposure, First, Second);

    /// <summary>The role of every row: null where the exposure is missing; a later sample of the first member's person is the first member again.</summary>
    public static string?[] Of(string?[] sets, string?[] exposures, string?[]? persons)
    {
        var firstOfSet = new Dictionary<string, int>(StringComparer.Ordinal);
        var roles = new string?[sets.Length];
        for (int row = 0; row < roles.Length; row++)
        {
            if (sets[row] is not { } set || exposures[row] is null)
                continue;
            bool isFirst = firstOfSet.TryAdd(set, row) || (persons?[row] is { } person && person == persons[firstOfSet[set]]);
            roles[row] = isFirst ? First : Second;
        }

        return roles;
    }
}
