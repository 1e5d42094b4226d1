using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>What a comparison of two places knows of each set beside the endpoint: covariates, exposure, times. The same for every endpoint.</summary>
public sealed class PairColumns
{
    private PairColumns(int sets) => CovariatesKnown = new bool[sets];

    /// <summary>Covariates, as columns are named in messages.</summary>
    public string[] CovariateNames { get; private init; } = [];

    /// <summary>Within-set differences of each covariate, one a set; NaN where missing.</summary>
    public double[][] Covariates { get; private init; } = [];

    /// <summary>True for the sets whose covariates are all known.</summary>
    public bool[] CovariatesKnown { get; }

    /// <summary>Within-set differences of the exposure; empty where the role is the exposure.</summary>
    public double[] Exposure { get; private init; } = [];

    /// <summary>Time at risk on the index side; empty where all times are equal.</summary>
    public double[] IndexTime { get; private init; } = [];

    /// <summary>Time at risk on the reference side; empty where all times are equal.</summary>
    public double[] ReferenceTime { get; private init; } = [];

    /// <summary>True for the sets that have both times, or where no times are needed.</summary>
    public bool TimesKnown(int set) => IndexTime.Length == 0 || (IndexTime[set] > 0 && ReferenceTime[set] > 0);

    /// <summary>Names of the covariates that cannot be told from the comparison itself or from those before them.</summary>
    public IReadOnlyList<string> CollinearNames()
    {
        var scratch = new Scratch();
        int[] known = [.. Enumerable.Range(0, CovariatesKnown.Length).Where(set => CovariatesKnown[set])];
        var names = new List<string>();
        var kept = new List<double[]>();
        for (int column = 0; column < Covariates.Length; column++)
        {
            kept.Add([.. known.Select(set => Covariates[column][set])]);
            using Scratch.Frame frame = scratch.Open();
            PairSample pairs = PairSample.Of(new double[known.Length], new double[known.Length], frame);
            double[] exposure = [.. known.Where(_ => Exposure.Length > 0).Select(set => Exposure[set])];
            double[] all = [.. kept.SelectMany(values => values)];
            RegressionPairs sample = exposure.Length > 0
                ? RegressionPairs.WithExposure(pairs, exposure, all)
                : RegressionPairs.WithCovariates(pairs, all);
            if (AdjustedPairedT.FirstCollinear(sample, scratch) < 0)
                continue;
            names.Add(CovariateNames[column]);
            kept.RemoveAt(kept.Count - 1);
        }

        return names;
    }

    /// <summary>Takes the sheet's columns for one comparison.</summary>
    public static PairColumns Of(StudyInputs inputs, Place index, Place reference)
    {
        DesignSection design = inputs.Study.Design;
        IReadOnlyList<Covariate> covariates = inputs.Numbers.Covariates(design.Covariates);
        double[] time = design.PersonTime is { } column ? inputs.Numbers.Column(column, "design.person-time") : [];
        var columns = new PairColumns(index.Sets)
        {
            CovariateNames = [.. covariates.Select(covariate => covariate.Name)],
            Covariates = [.. covariates.Select(covariate => Differences(covariate.Values, index, reference))],
            Exposure = design.Exposure is { } exposure
                ? Differences(inputs.Numbers.Column(exposure, "design.exposure.column"), index, reference)
                : [],
            IndexTime = time.Length == 0 ? [] : Gathered(time, index),
            ReferenceTime = time.Length == 0 ? [] : Gathered(time, reference),
        };
        for (int set = 0; set < index.Sets; set++)
            columns.CovariatesKnown[set] = columns.Covariates.All(covariate => !double.IsNaN(covariate[set]));
        return columns;
    }

    private static double[] Gathered(double[] values, Place place)
    {
        var gathered = new double[place.Sets];
        place.Gather(values, gathered);
        return gathered;
    }

    private static double[] Differences(double[] values, Place index, Place reference)
    {
        double[] differences = Gathered(values, index);
        double[] subtracted = Gathered(values, reference);
        for (int set = 0; set < differences.Length; set++)
            differences[set] -= subtracted[set];
        return differences;
    }
}
