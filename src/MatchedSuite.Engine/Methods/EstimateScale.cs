namespace MatchedSuite.Engine.Methods;

/// <summary>What a method's estimate means.</summary>
public enum EstimateScale
{
    /// <summary>A difference on the analysis scale; a ratio where the transform is a logarithm.</summary>
    Analysis,

    /// <summary>A natural logarithm of odds or rates, whatever the transform.</summary>
    NaturalLog,
}
