namespace MatchedSuite.Study.Definition;

/// <summary>Intervals given beside the marginal ones.</summary>
public enum IntervalKind
{
    /// <summary>Adjusted so that the false coverage rate over the discoveries holds.</summary>
    Fcr,

    /// <summary>Covering all endpoints at once.</summary>
    Simultaneous,

    /// <summary>By the profile likelihood, for likelihood methods.</summary>
    Profile,

    /// <summary>Of the standardised mean difference, by the noncentral t.</summary>
    EffectSize,
}
