using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Strata;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Compares one method's results between strata; one worker owns it and reuses it.</summary>
internal sealed class StrataRows(int strata, TestOptions options)
{
    private readonly TestResult[] _results = new TestResult[strata];
    private readonly PairedTable[] _tables = new PairedTable[strata];
    private int _sets;
    private int _samples;

    /// <summary>Forgets the method before.</summary>
    public void Clear()
    {
        _sets = 0;
        _samples = 0;
    }

    /// <summary>Keeps one stratum's result.</summary>
    public void Keep(short stratum, in TestResult result, in PairSample pairs, EndpointKind kind)
    {
        Keep(stratum, result);
        if (kind == EndpointKind.Binary)
            _tables[stratum] = PairedTable.Of(pairs);
    }

    /// <summary>Keeps one stratum's result where no table of pairs belongs to it.</summary>
    public void Keep(short stratum, in TestResult result)
    {
        _results[stratum] = result;
        _sets += result.Sets;
        _samples += result.Samples;
    }

    /// <summary>Fills the row of the comparison.</summary>
    public void Fill(StrataComparison comparison, ref ResultRow row)
    {
        TestResult result = comparison switch
        {
            StrataComparison.Discordance when _results.Length == 2 => DiscordanceDifference.Run(_tables[0], _tables[1], options.Sides),
            StrataComparison.Means => StratumDifference.OfMeans(_results, options),
            _ => StratumDifference.OfEstimates(_results, options),
        };
        row.Stratum = ResultRow.BetweenStrata;
        row.Take(result);
        row.Sets = _sets;
        row.Samples = _samples;
    }
}
