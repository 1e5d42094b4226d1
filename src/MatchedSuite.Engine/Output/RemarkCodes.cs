using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>The codes of the column <c>flags</c>: the names of <see cref="Remarks"/> in small letters with hyphens.</summary>
public static class RemarkCodes
{
    private static readonly (Remarks Remark, string Code)[] Codes =
        [.. Enum.GetValues<Remarks>().Where(remark => remark != Remarks.None).Select(remark => (remark, WrittenName.Of(remark)))];

    /// <summary>The codes of all remarks, joined by semicolons; empty for none.</summary>
    public static string Join(Remarks remarks) =>
        remarks == Remarks.None
            ? ""
            : string.Join(';', Codes.Where(code => remarks.HasFlag(code.Remark)).Select(code => code.Code));
}
