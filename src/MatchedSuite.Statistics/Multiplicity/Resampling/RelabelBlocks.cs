namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Who may exchange labels with whom: members block after block, each labelled index or reference.</summary>
/// <remarks>Blocks are matched sets of any shape N:M, or one block of all subjects where labels are arms.</remarks>
public sealed class RelabelBlocks
{
    private readonly int[] _starts;
    private readonly bool[] _isIndex;
    private readonly int[] _indexCounts;

    /// <summary>Takes the labels as they are.</summary>
    /// <param name="starts">Where each block starts among the members, then the number of members.</param>
    /// <param name="isIndex">True for a member labelled index.</param>
    /// <exception cref="ArgumentException">The lengths do not fit together.</exception>
    public RelabelBlocks(ReadOnlySpan<int> starts, ReadOnlySpan<bool> isIndex)
    {
        Require.OneStartASet(starts, isIndex.Length);
        _starts = starts.ToArray();
        _isIndex = isIndex.ToArray();
        _indexCounts = new int[starts.Length - 1];
        for (int block = 0; block < _indexCounts.Length; block++)
            _indexCounts[block] = isIndex[starts[block]..starts[block + 1]].Count(true);
    }

    /// <summary>Number of blocks.</summary>
    public int Count => _indexCounts.Length;

    /// <summary>Number of members over all blocks.</summary>
    public int Members => _isIndex.Length;

    /// <summary>Where each block starts among the members, then the number of members.</summary>
    public ReadOnlySpan<int> Starts => _starts;

    /// <summary>How many members of each block are labelled index.</summary>
    public ReadOnlySpan<int> IndexCounts => _indexCounts;

    /// <summary>True for a member labelled index.</summary>
    public ReadOnlySpan<bool> IsIndex => _isIndex;

    /// <summary>True where labels that all change places are again labels of the same blocks: every block that has both has as many of each.</summary>
    public bool IsBalanced
    {
        get
        {
            for (int block = 0; block < Count; block++)
            {
                if (Fewer(block) > 0 && 2 * Fewer(block) != Size(block))
                    return false;
            }

            return true;
        }
    }

    /// <summary>Members of a block.</summary>
    internal int Size(int block) => _starts[block + 1] - _starts[block];

    /// <summary>Members of the label that fewer members of a block have.</summary>
    internal int Fewer(int block) => Math.Min(_indexCounts[block], Size(block) - _indexCounts[block]);
}
