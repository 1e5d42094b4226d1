using MatchedSuite.Storage;

namespace MatchedSuite.Engine.Running;

/// <summary>The warnings of a run: told and kept, or each a refusal.</summary>
internal sealed class RunWarnings(WarningRule rule, IRunObserver observer)
{
    private readonly List<string> _texts = [];

    /// <summary>The warnings so far.</summary>
    public IReadOnlyList<string> Texts => _texts;

    /// <summary>Takes warnings in their order.</summary>
    /// <exception cref="RefusalException">Warnings refuse the data.</exception>
    public void Take(IEnumerable<string> warnings)
    {
        foreach (string warning in warnings)
        {
            if (rule == WarningRule.Refuse)
                throw new RefusalException("--strict", warning, "data without warnings", "Correct the data, or run without --strict.");
            _texts.Add(warning);
            observer.Warning(warning);
        }
    }
}
