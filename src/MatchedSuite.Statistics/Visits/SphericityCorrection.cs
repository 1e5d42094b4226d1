namespace MatchedSuite.Statistics.Visits;

/// <summary>How the degrees of freedom of a repeated-measures F answer for unequal variances of the differences between visits.</summary>
public enum SphericityCorrection
{
    /// <summary>Not at all: ε = 1.</summary>
    None,

    /// <summary>Greenhouse and Geisser's estimate of ε; errs on the safe side.</summary>
    GreenhouseGeisser,

    /// <summary>Huynh and Feldt's estimate of ε, at most 1; nearly unbiased.</summary>
    HuynhFeldt,

    /// <summary>The smallest ε there can be, 1/(k − 1).</summary>
    LowerBound,
}
