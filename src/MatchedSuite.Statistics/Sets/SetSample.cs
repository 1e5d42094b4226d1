namespace MatchedSuite.Statistics.Sets;

/// <summary>One endpoint measured on the members of matched sets: what every method for sets sees.</summary>
/// <remarks>
/// <para>Shape: the members lie set after set; set s holds the members <c>Starts[s] .. Starts[s + 1]</c>, of which the first
/// <c>IndexCounts[s]</c> have the index role (cases, exposed) and the others the reference role (controls). Every value is
/// finite and every set has at least one member of each role.</para>
/// <para>Covariates lie column after column, each with one value a member in the same order.</para>
/// </remarks>
public readonly ref struct SetSample
{
    private SetSample(
        ReadOnlySpan<double> values, ReadOnlySpan<int> starts, ReadOnlySpan<int> indexCounts, ReadOnlySpan<double> covariates, Losses losses)
    {
        Values = values;
        Starts = starts;
        IndexCounts = indexCounts;
        Covariates = covariates;
        Lost = losses;
    }

    /// <summary>Values of the members, set after set, index role first within a set; endpoint units.</summary>
    public ReadOnlySpan<double> Values { get; }

    /// <summary>Where each set starts among the members; one more entry than sets, the last is the number of members.</summary>
    public ReadOnlySpan<int> Starts { get; }

    /// <summary>How many members of each set, counted from its start, have the index role.</summary>
    public ReadOnlySpan<int> IndexCounts { get; }

    /// <summary>All covariates, column after column, one value a member.</summary>
    public ReadOnlySpan<double> Covariates { get; }

    /// <summary>Members and sets that were handed over but cannot be used.</summary>
    public Losses Lost { get; }

    /// <summary>Number of sets.</summary>
    public int Sets => IndexCounts.Length;

    /// <summary>Number of members over all sets.</summary>
    public int Members => Values.Length;

    /// <summary>Number of covariates.</summary>
    public int CovariateCount => Members == 0 ? 0 : Covariates.Length / Members;

    /// <summary>One covariate, one value a member.</summary>
    /// <param name="column">Which one, counted from 0 in the order they were handed over.</param>
    public ReadOnlySpan<double> Covariate(int column) => Covariates.Slice(column * Members, Members);

    /// <summary>What was handed over and had to be left out.</summary>
    /// <param name="MissingMembers">Members whose value or one of whose covariates is missing.</param>
    /// <param name="Sets">Sets left without a member of either role.</param>
    /// <param name="MembersOfLostSets">Members with all values whose set was lost.</param>
    public readonly record struct Losses(int MissingMembers, int Sets, int MembersOfLostSets);

    /// <summary>Takes one endpoint without covariates; see the overload with covariates.</summary>
    /// <param name="values">One value a member, set after set; NaN is missing.</param>
    /// <param name="starts">Where each set starts, then the number of members.</param>
    /// <param name="isIndex">True for a member with the index role.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths do not fit together.</exception>
    public static SetSample Of(
        scoped ReadOnlySpan<double> values, scoped ReadOnlySpan<int> starts, scoped ReadOnlySpan<bool> isIndex, in Scratch.Frame frame) =>
        Of(values, starts, isIndex, [], frame);

    /// <summary>Takes one endpoint that every member has, without copying: the members already lie as <see cref="SetSample"/> says.</summary>
    /// <param name="values">One finite value a member, set after set, index role first within a set.</param>
    /// <param name="starts">Where each set starts among the members, then the number of members.</param>
    /// <param name="indexCounts">How many members of each set have the index role: at least one, and not all.</param>
    /// <param name="covariates">Columns one after another, each with one finite value a member.</param>
    /// <exception cref="ArgumentException">The lengths do not fit together, or a set lacks a role.</exception>
    public static SetSample OfComplete(
        ReadOnlySpan<double> values, ReadOnlySpan<int> starts, ReadOnlySpan<int> indexCounts, ReadOnlySpan<double> covariates)
    {
        Require.OneStartASet(starts, values.Length);
        Require.OneEntryAMember(indexCounts.Length, starts.Length - 1);
        Require.WholeColumns(covariates, values.Length);
        for (int s = 0; s < indexCounts.Length; s++)
        {
            if (indexCounts[s] < 1 || indexCounts[s] >= starts[s + 1] - starts[s])
                throw new ArgumentException($"Set {s + 1} has {indexCounts[s]} of {starts[s + 1] - starts[s]} members in the index role; it needs both roles.");
        }

        return new SetSample(values, starts, indexCounts, covariates, default);
    }

    /// <summary>
    /// Takes the usable members into the memory of <paramref name="frame"/>: members with a missing value or covariate leave
    /// their set, then sets without both roles leave, and both are counted.
    /// </summary>
    /// <param name="values">One value a member, set after set; NaN is missing.</param>
    /// <param name="starts">Where each set starts among the members, then the number of members.</param>
    /// <param name="isIndex">True for a member with the index role, false for the reference role.</param>
    /// <param name="covariates">Columns one after another, each with one value a member; NaN is missing.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths do not fit together.</exception>
    public static SetSample Of(
        scoped ReadOnlySpan<double> values,
        scoped ReadOnlySpan<int> starts,
        scoped ReadOnlySpan<bool> isIndex,
        scoped ReadOnlySpan<double> covariates,
        in Scratch.Frame frame)
    {
        Require.OneStartASet(starts, values.Length);
        Require.OneEntryAMember(isIndex.Length, values.Length);
        int columns = Require.WholeColumns(covariates, values.Length);

        Span<int> order = frame.Integers(values.Length);
        Span<int> usedStarts = frame.Integers(starts.Length);
        Span<int> indexCounts = frame.Integers(starts.Length - 1);
        int members = 0, sets = 0, missing = 0, lostSets = 0, membersOfLostSets = 0;
        usedStarts[0] = 0;
        for (int s = 0; s + 1 < starts.Length; s++)
        {
            int present = TakeRole(true, values, isIndex, covariates, starts[s], starts[s + 1], order, members);
            int all = present + TakeRole(false, values, isIndex, covariates, starts[s], starts[s + 1], order, members + present);
            missing += starts[s + 1] - starts[s] - all;
            if (present == 0 || present == all)
            {
                lostSets++;
                membersOfLostSets += all;
                continue;
            }

            indexCounts[sets++] = present;
            members += all;
            usedStarts[sets] = members;
        }

        order = order[..members];
        Span<double> usedCovariates = frame.Doubles(columns * members);
        for (int c = 0; c < columns; c++)
            Gather(covariates.Slice(c * values.Length, values.Length), order, usedCovariates.Slice(c * members, members));
        Span<double> usedValues = frame.Doubles(members);
        Gather(values, order, usedValues);
        return new SetSample(
            usedValues, usedStarts[..(sets + 1)], indexCounts[..sets], usedCovariates, new Losses(missing, lostSets, membersOfLostSets));
    }

    private static int TakeRole(
        bool role,
        ReadOnlySpan<double> values,
        ReadOnlySpan<bool> isIndex,
        ReadOnlySpan<double> covariates,
        int from,
        int to,
        Span<int> order,
        int at)
    {
        int taken = 0;
        for (int member = from; member < to; member++)
        {
            if (isIndex[member] != role || double.IsNaN(values[member]))
                continue;
            bool complete = true;
            for (int i = member; i < covariates.Length; i += values.Length)
                complete &= !double.IsNaN(covariates[i]);
            if (complete)
                order[at + taken++] = member;
        }

        return taken;
    }

    private static void Gather(ReadOnlySpan<double> source, ReadOnlySpan<int> order, Span<double> target)
    {
        for (int i = 0; i < order.Length; i++)
            target[i] = source[order[i]];
    }
}
