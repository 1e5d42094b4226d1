using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Running;

/// <summary>One thread's second look at the endpoints: every method once more, at the confidence its interval needs.</summary>
internal sealed class IntervalWorker(AnalysisPlan plan, IntervalPlan wanted, IReadOnlyDictionary<string, int> positions, AdjustedColumns columns) : IBlockWorker
{
    // Families may ask for many confidences; evaluators are kept for as many as this.
    private const int MostEvaluators = 64;

    private readonly Dictionary<double, EndpointEvaluator> _evaluators = [];
    private readonly BlockOutput _output = new();
    private double[] _values = [];

    /// <inheritdoc/>
    public void Work(EndpointBlock block, BlockResult result)
    {
        for (int endpoint = 0; endpoint < block.Count; endpoint++)
        {
            result.Names.Add(block.Names[endpoint]);
            Evaluate(block.Values(endpoint), block.Names[endpoint]);
        }
    }

    private void Evaluate(ReadOnlySpan<double> values, string name)
    {
        Range rows = wanted.Rows(positions[name]);
        foreach (double confidence in Confidences(rows))
        {
            if (_values.Length < values.Length)
                _values = new double[values.Length];
            values.CopyTo(_values);
            _output.Clear();
            Evaluator(confidence).Evaluate(_values.AsSpan(0, values.Length), plan.Catalogue.Describe(name), 0, _output);
            foreach (IntervalKind kind in wanted.Kinds)
                Take(kind, confidence, rows);
        }
    }

    private SortedSet<double> Confidences(Range rows)
    {
        var confidences = new SortedSet<double>();
        foreach (IntervalKind kind in wanted.Kinds)
        {
            for (int row = rows.Start.Value; row < rows.End.Value; row++)
            {
                double confidence = wanted.Confidence(kind, row);
                if (!double.IsNaN(confidence))
                    confidences.Add(confidence);
            }
        }

        return confidences;
    }

    private void Take(IntervalKind kind, double confidence, Range rows)
    {
        for (int row = rows.Start.Value; row < rows.End.Value; row++)
        {
            if (wanted.Confidence(kind, row) != confidence)
                continue;
            ref readonly ResultRow again = ref _output.Rows.Records[row - rows.Start.Value];
            columns.SetInterval(kind, row, new Interval(again.Low, again.High));
        }
    }

    private EndpointEvaluator Evaluator(double confidence)
    {
        if (_evaluators.TryGetValue(confidence, out EndpointEvaluator? evaluator))
            return evaluator;
        if (_evaluators.Count == MostEvaluators)
            _evaluators.Clear();
        evaluator = plan.At(confidence).NewEvaluator();
        _evaluators.Add(confidence, evaluator);
        return evaluator;
    }
}
