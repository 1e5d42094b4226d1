using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>The analysis-of-variance table of one endpoint over complete subjects. Numbers are NaN unless <see cref="Outcome"/> is Tested.</summary>
/// <param name="Outcome">Whether F could be computed.</param>
/// <param name="Subjects">Complete subjects, n.</param>
/// <param name="Visits">Visits, k.</param>
/// <param name="VisitSquares">Sum of squares between visits, squared endpoint unit.</param>
/// <param name="SubjectSquares">Sum of squares between subjects.</param>
/// <param name="ErrorSquares">Sum of squares of visits within subjects.</param>
/// <param name="GreenhouseGeisser">Greenhouse and Geisser's ε, from 1/(k − 1) to 1.</param>
/// <param name="HuynhFeldt">Huynh and Feldt's ε as computed: it may pass 1.</param>
/// <param name="Sphericity">Mauchly's test.</param>
public readonly record struct RepeatedMeasuresAnovaFit(
    Outcome Outcome, int Subjects, int Visits, double VisitSquares, double SubjectSquares, double ErrorSquares,
    double GreenhouseGeisser, double HuynhFeldt, MauchlySphericity Sphericity)
{
    /// <summary>Numerator degrees of freedom without correction, k − 1.</summary>
    public int VisitDegrees => Visits - 1;

    /// <summary>Denominator degrees of freedom without correction, (n − 1)(k − 1).</summary>
    public int ErrorDegrees => (Subjects - 1) * (Visits - 1);

    /// <summary>Mean square between visits over error mean square.</summary>
    public double F => VisitSquares / VisitDegrees / (ErrorSquares / ErrorDegrees);

    /// <summary>Share of the visits in the variation that is not between subjects.</summary>
    public double PartialEtaSquared => VisitSquares / (VisitSquares + ErrorSquares);

    /// <summary>The factor on both degrees of freedom.</summary>
    public double Epsilon(SphericityCorrection correction) => correction switch
    {
        SphericityCorrection.GreenhouseGeisser => GreenhouseGeisser,
        SphericityCorrection.HuynhFeldt => Math.Min(1, HuynhFeldt),
        SphericityCorrection.LowerBound => 1.0 / VisitDegrees,
        _ => 1,
    };

    /// <summary>Upper tail of F with corrected degrees of freedom.</summary>
    public Probability P(SphericityCorrection correction)
    {
        if (Outcome != Outcome.Tested)
            return Probability.Missing;
        double epsilon = Epsilon(correction);
        return FisherF.UpperTail(F, epsilon * VisitDegrees, epsilon * ErrorDegrees);
    }
}
