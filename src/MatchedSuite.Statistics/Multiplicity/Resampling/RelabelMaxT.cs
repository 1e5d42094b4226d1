namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The max-T adjustment of Westfall and Young by common relabelings of members within blocks: familywise error rate for matched sets and for arms.</summary>
/// <remarks>
/// <para>Null: the labels index and reference are exchangeable within each block, for all endpoints of a member together, missing ones
/// included. A relabeling moves a member with everything measured on it, so it leaves the dependence between endpoints as it is.</para>
/// <para>Statistic: U = Σ over blocks, Σ over index members, of (x − block mean), over the square root of its variance over all
/// relabelings, Σ k(n − k)/(n(n − 1)) times the block's sum of squares. For matched sets U is the score of the conditional logistic
/// likelihood at 0; for one block it is proportional to the difference of the two means. Two-sided: |U|.</para>
/// <para>A missing value is put at the mean of the block's present members: it adds nothing to U or to the sum of squares, and n and k stay those
/// of the block. Labels move as if it were there, so one relabeling serves every endpoint.</para>
/// <para>Where all relabelings (the product of the binomials of the blocks) number no more than <see cref="ResamplingOptions.Resamples"/> + 1
/// they are listed and p is exact; else they are drawn. p = (1 + b)/(1 + B), step-down, single step and ties as in <see cref="MaxT"/>. With
/// one member of each label in every block the p-values are those of flips of the differences.</para>
/// <para>Sources: Westfall and Young (1993), Resampling-Based Multiple Testing; Strasser and Weber (1999), Mathematical Methods of
/// Statistics 8, 220-250 (variance of linear statistics). Worked through in docs/methods/max-t.md.</para>
/// </remarks>
public static class RelabelMaxT
{
    /// <summary>Adjusts all endpoints of a store.</summary>
    /// <param name="values">One value a member for each endpoint, in the order of the blocks; NaN where missing.</param>
    /// <param name="blocks">Who may exchange labels with whom.</param>
    /// <param name="options">The relabelings; there is but one statistic, so <see cref="ResamplingOptions.Statistic"/> is not asked.</param>
    /// <param name="cancellation">Stops the run between panels and blocks of relabelings.</param>
    /// <returns>Missing for an endpoint without spread within any block that has both labels. The critical value is one of |U| or U over its standard deviation.</returns>
    /// <exception cref="ArgumentException">The store has another number of members than the blocks.</exception>
    /// <exception cref="ArgumentOutOfRangeException">An option is out of range.</exception>
    public static ResamplingResult Run(
        IDifferenceStore values, RelabelBlocks blocks, ResamplingOptions options, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(values);
        ArgumentNullException.ThrowIfNull(blocks);
        ArgumentNullException.ThrowIfNull(options);
        options.Validate();
        if (values.Sets != blocks.Members)
            throw new ArgumentException($"The store has {values.Sets} values an endpoint, and the blocks have {blocks.Members} members.", nameof(values));
        var relabelings = new CommonRelabelings(blocks, options.Seed, options.Resamples);
        return MaxT.Run(new LabelledValues(values, blocks), relabelings, options with { Statistic = FlipStatistic.Score }, cancellation);
    }
}
