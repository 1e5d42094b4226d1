using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Running;

/// <summary>A gate of the study file refused the data: the audit is written, no test was run; the program ends with exit code 3.</summary>
/// <param name="gates">Each broken gate: what was found and what is allowed.</param>
/// <param name="folder">Where the audit is.</param>
public sealed class GateBrokenException(IReadOnlyList<string> gates, string folder)
    : Exception($"the data break {(gates.Count == 1 ? "a gate" : $"{gates.Count} gates")} of the study file: {string.Join("; ", gates)}. "
        + $"No test was run. The audit in {Path.Combine(folder, "audit")} lists the samples and sets; correct the data or the gate.")
{
    /// <summary>A broken gate in words.</summary>
    public static string Describe(BrokenGate gate) => $"gates.{gate.Gate}: {gate.Found}, allowed is {gate.Allowed}";
}
