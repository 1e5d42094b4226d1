using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Methods;

/// <summary>A procedure that turns the p-values of one set of hypotheses into adjusted ones; missing ones stay missing and do not count.</summary>
public delegate void AdjustmentProcedure(in Hypotheses hypotheses, Span<Probability> adjusted);

/// <summary>For each hypothesis the largest p-value that the first step of a procedure rejects when no other hypothesis helps it.</summary>
public delegate void FirstStepThreshold(in Hypotheses hypotheses, double level, Span<double> thresholds);

/// <summary>An adjustment that needs nothing but p-values, weights and families.</summary>
/// <param name="Name">Its name in the study file.</param>
/// <param name="Controls">The error rate it controls.</param>
/// <param name="Procedure">The procedure itself.</param>
public sealed record PValueAdjustment(string Name, ErrorRate Controls, AdjustmentProcedure Procedure) : Adjustment(Name, Controls)
{
    /// <summary>What its first step asks of a p-value; null where no single step decides.</summary>
    public FirstStepThreshold? FirstStep { get; init; }

    /// <summary>The procedure under <c>family: by-family-then-all</c>; null where families are not selected by it.</summary>
    public AdjustmentProcedure? OverSelectedFamilies { get; init; }

    /// <summary>True where the families themselves are what is tested in order, so that one family alone is no question for it.</summary>
    public bool GoesFromFamilyToFamily { get; init; }
}
