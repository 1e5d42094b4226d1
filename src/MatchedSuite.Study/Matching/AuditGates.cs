using System.Globalization;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The gates that the matching can break.</summary>
internal static class AuditGates
{
    // Shares are quotients of counts; a limit of 5% must not be broken by the last bit of 12/240.
    private const double Rounding = 1e-12;

    /// <summary>The broken gates, in the order of the study file.</summary>
    /// <param name="gates">The section <c>gates</c>.</param>
    /// <param name="unmatched">Rows with a role of interest that end without a complete set.</param>
    /// <param name="ofInterest">All rows with a role of interest.</param>
    /// <param name="outside">Sets that break a promise of the matching.</param>
    public static List<BrokenGate> Broken(GateSection gates, int unmatched, int ofInterest, int outside)
    {
        var broken = new List<BrokenGate>();
        double share = ofInterest == 0 ? 0 : (double)unmatched / ofInterest;
        if (gates.UnmatchedAtMost is { } most && share > most + Rounding)
            broken.Add(new BrokenGate("unmatched-at-most", $"{unmatched} of {ofInterest} samples without a complete set ({Percent(share)})", $"at most {Percent(most)}"));
        if (gates.Tolerance == Tolerance.Refuse && outside > 0)
            broken.Add(new BrokenGate("tolerance", outside == 1 ? "1 set outside match-on" : $"{outside} sets outside match-on", "no set outside match-on"));
        return broken;
    }

    private static string Percent(double share) => string.Create(CultureInfo.InvariantCulture, $"{100 * share:0.##}%");
}
