namespace MatchedSuite.Statistics.Twins;

/// <summary>Falconer's reading of twin correlations: a description under strong assumptions, not an estimate with an error.</summary>
/// <remarks>
/// It takes the shared environment to be equally alike for both kinds of twins and all genetic effects to add up. Values
/// outside 0 to 1 say that the assumptions, or chance, are at work. Source: Falconer (1960), Introduction to Quantitative
/// Genetics. Worked through in docs/methods/twins.md.
/// </remarks>
public static class Falconer
{
    /// <summary>2(r_MZ − r_DZ): share of variance that goes with genes.</summary>
    /// <param name="monozygotic">Intraclass correlation of monozygotic pairs.</param>
    /// <param name="dizygotic">Intraclass correlation of dizygotic pairs.</param>
    public static double Heritability(double monozygotic, double dizygotic) => 2 * (monozygotic - dizygotic);

    /// <summary>2·r_DZ − r_MZ: share of variance that goes with what twins share besides genes.</summary>
    /// <param name="monozygotic">Intraclass correlation of monozygotic pairs.</param>
    /// <param name="dizygotic">Intraclass correlation of dizygotic pairs.</param>
    public static double SharedEnvironment(double monozygotic, double dizygotic) => (2 * dizygotic) - monozygotic;
}
