namespace MatchedSuite.Engine.Running;

/// <summary>Who listens to a run: a terminal, a log, a test.</summary>
public interface IRunObserver
{
    /// <summary>A step begins.</summary>
    void Step(string text);

    /// <summary>Something a person should know.</summary>
    void Note(string text);

    /// <summary>Something that may be wrong with the data; a refusal under <see cref="WarningRule.Refuse"/>.</summary>
    void Warning(string text);

    /// <summary>How far the run is.</summary>
    /// <param name="reached">Share of the input read, in [0, 1].</param>
    /// <param name="endpoints">Endpoints finished.</param>
    void Progress(double reached, int endpoints);

    /// <summary>The counting is over.</summary>
    void ProgressOver();
}
