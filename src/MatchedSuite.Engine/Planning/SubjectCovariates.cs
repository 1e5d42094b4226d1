using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>Covariates of every subject and visit; the same for every endpoint.</summary>
/// <param name="Count">Covariates of each sample.</param>
/// <param name="Values">Subjects × visits × covariates; NaN where missing.</param>
public sealed record SubjectCovariates(int Count, double[] Values)
{
    /// <summary>Takes the sheet's columns.</summary>
    public static SubjectCovariates Of(StudyInputs inputs)
    {
        IReadOnlyList<Covariate> covariates = inputs.Numbers.Covariates(inputs.Study.Design.Covariates);
        Arrangement arrangement = inputs.Audit.Arrangement;
        int visits = arrangement.Places.Length;
        var values = new double[arrangement.Sets.Length * visits * covariates.Count];
        var gathered = new double[arrangement.Sets.Length];
        for (int column = 0; column < covariates.Count; column++)
        {
            for (int visit = 0; visit < visits; visit++)
            {
                arrangement.Places[visit].Gather(covariates[column].Values, gathered);
                for (int subject = 0; subject < gathered.Length; subject++)
                    values[((subject * visits) + visit) * covariates.Count + column] = gathered[subject];
            }
        }

        return new SubjectCovariates(covariates.Count, values);
    }
}
