namespace MatchedSuite.Statistics.Sets;

/// <summary>The conditional likelihood of sets with several members in both roles (N:M), by recursion over the members.</summary>
/// <remarks>
/// <para>The chosen members are those of the smaller role. With D = column value minus the mean of the chosen (sign turned where
/// the references are chosen), the set's likelihood is 1 / Σ exp(β·ΣD), summed over all subsets as large as the chosen one.</para>
/// <para>That sum is an elementary symmetric function, built up member by member (Gail, Lubin and Rubinstein 1981). Here each
/// member's weight exp(β·D) is first turned into a probability w = e^z/(1 + e^z), z = β·D − tilt, with the tilt such that about
/// as many members as chosen are expected; the recursion is then that of the number of successes in unequal trials, which can
/// neither overflow nor underflow where it matters, and Σ = P(chosen)·Π(1 + e^z)·e^(chosen·tilt) is exact for every tilt.</para>
/// <para>Derivatives ride along as mean and covariance of the sum of D given the number of successes: all steps are averages
/// with weights in [0, 1], so nothing cancels.</para>
/// </remarks>
internal readonly ref struct SubsetChoices
{
    private const int MostTiltSteps = 60;

    // Half a member off the wanted number costs nothing: the answer is exact for every tilt.
    private const double CloseEnough = 0.5;
    private const double ProductBeforeLogging = 1e280;

    // The chance of the wanted number is at least exp(−this) however the tilt is chosen: far from underflow.
    private const double HarmlessTilt = 300;

    private readonly ReadOnlySpan<double> _differences;
    private readonly ReadOnlySpan<int> _starts;
    private readonly ReadOnlySpan<int> _chosen;
    private readonly Span<double> _along;
    private readonly Span<double> _probability;
    private readonly Span<double> _means;
    private readonly Span<double> _covariances;
    private readonly int _columns;

    private SubsetChoices(
        ReadOnlySpan<double> differences, ReadOnlySpan<int> starts, ReadOnlySpan<int> chosen, int largest, int columns, in Scratch.Frame frame)
    {
        _differences = differences;
        _starts = starts;
        _chosen = chosen;
        _columns = columns;
        int states = (largest / 2) + 1;
        _along = frame.Doubles(largest);
        _probability = frame.Doubles(states);
        _means = frame.Doubles(states * columns);
        _covariances = frame.Doubles(states * columns * columns);
    }

    /// <summary>Lays the sets out.</summary>
    /// <param name="sets">The sets; those that <see cref="SingleChoiceTiles"/> takes are passed over.</param>
    /// <param name="design">Columns one after another, one value a member.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public static SubsetChoices Of(in SetSample sets, ReadOnlySpan<double> design, int columns, in Scratch.Frame frame)
    {
        int count = 0, total = 0, largest = 0;
        for (int s = 0; s < sets.Sets; s++)
        {
            int members = sets.Starts[s + 1] - sets.Starts[s];
            if (SingleChoiceTiles.Takes(members, sets.IndexCounts[s]))
                continue;
            count++;
            total += members;
            largest = Math.Max(largest, members);
        }

        Span<double> differences = frame.Doubles(total * columns);
        Span<int> starts = frame.Integers(count + 1);
        Span<int> chosen = frame.Integers(count);
        starts[0] = 0;
        for (int s = 0, taken = 0; s < sets.Sets; s++)
        {
            int from = sets.Starts[s], to = sets.Starts[s + 1], index = sets.IndexCounts[s];
            if (SingleChoiceTiles.Takes(to - from, index))
                continue;
            bool indexIsChosen = 2 * index <= to - from;
            chosen[taken] = indexIsChosen ? index : to - from - index;
            Place(differences[(starts[taken] * columns)..], design, columns, sets.Members, from, to, index, indexIsChosen);
            starts[++taken] = starts[taken - 1] + to - from;
        }

        return new SubsetChoices(differences, starts, chosen, largest, columns, frame);
    }

    /// <summary>Adds the log-likelihood and its derivatives at <paramref name="beta"/>, as <see cref="SingleChoices.AddTo"/> does.</summary>
    public double AddTo(ReadOnlySpan<double> beta, Span<double> gradient, Span<double> information)
    {
        double logLikelihood = 0;
        for (int s = 0; s < _chosen.Length; s++)
        {
            ReadOnlySpan<double> members = _differences[(_starts[s] * _columns)..(_starts[s + 1] * _columns)];
            int chosen = _chosen[s];
            logLikelihood -= LogOfSubsets(members, chosen, beta);
            ReadOnlySpan<double> mean = _means.Slice(chosen * _columns, _columns);
            ReadOnlySpan<double> covariance = _covariances.Slice(chosen * _columns * _columns, _columns * _columns);
            for (int c = 0; c < _columns; c++)
                gradient[c] -= mean[c];
            for (int entry = 0; entry < covariance.Length; entry++)
                information[entry] += covariance[entry];
        }

        return logLikelihood;
    }

    /// <summary>Whether the chosen members lead along a direction; see <see cref="ConditionalLikelihood.NeverFallsAlong"/>.</summary>
    public (bool NeverBehind, bool SomewhereAhead) LeadAlong(ReadOnlySpan<double> direction, ReadOnlySpan<double> tolerances)
    {
        bool somewhereAhead = false;
        for (int s = 0; s < _chosen.Length; s++)
        {
            for (int member = _starts[s] + _chosen[s]; member < _starts[s + 1]; member++)
            {
                for (int chosen = _starts[s]; chosen < _starts[s] + _chosen[s]; chosen++)
                {
                    double along = 0, level = 0;
                    for (int c = 0; c < _columns; c++)
                    {
                        double difference = _differences[(member * _columns) + c] - _differences[(chosen * _columns) + c];
                        along += direction[c] * difference;
                        level += tolerances[c] * Math.Abs(difference);
                    }

                    if (along > level)
                        return (false, somewhereAhead);
                    somewhereAhead |= along < -level;
                }
            }
        }

        return (true, somewhereAhead);
    }

    /// <summary>The log-likelihood of a single column at infinity; see <see cref="ConditionalLikelihood.LimitAlong"/>.</summary>
    public double LimitAlong(double direction)
    {
        double logLikelihood = 0;
        for (int s = 0; s < _chosen.Length; s++)
        {
            ReadOnlySpan<double> members = _differences[_starts[s].._starts[s + 1]];
            double least = double.PositiveInfinity;
            foreach (double member in members[.._chosen[s]])
                least = Math.Min(least, direction * member);
            int inside = 0, outside = 0;
            for (int i = 0; i < members.Length; i++)
            {
                if (direction * members[i] == least)
                    _ = i < _chosen[s] ? inside++ : outside++;
            }

            // As many subsets as ways to fill the places at the boundary: binomial of inside + outside over inside.
            for (int i = 1; i <= outside; i++)
                logLikelihood -= NaturalLogarithm.Of((double)(inside + i) / i);
        }

        return logLikelihood;
    }

    private static void Place(
        Span<double> target, ReadOnlySpan<double> design, int columns, int members, int from, int to, int index, bool indexIsChosen)
    {
        double sign = indexIsChosen ? 1 : -1;
        int split = from + index;
        for (int c = 0; c < columns; c++)
        {
            ReadOnlySpan<double> column = design.Slice(c * members, members);
            ReadOnlySpan<double> chosen = indexIsChosen ? column[from..split] : column[split..to];
            ReadOnlySpan<double> others = indexIsChosen ? column[split..to] : column[from..split];

            // Offsets leave by the first chosen value, then the mean of what remains is small and exact enough.
            double origin = chosen[0], mean = 0;
            foreach (double value in chosen)
                mean += value - origin;
            mean /= chosen.Length;
            for (int i = 0; i < chosen.Length; i++)
                target[(i * columns) + c] = sign * (chosen[i] - origin - mean);
            for (int i = 0; i < others.Length; i++)
                target[((chosen.Length + i) * columns) + c] = sign * (others[i] - origin - mean);
        }
    }

    // Leaves mean and covariance of the sum over a random subset of the wanted size in the state of that size.
    private double LogOfSubsets(ReadOnlySpan<double> members, int chosen, ReadOnlySpan<double> beta)
    {
        int count = members.Length / _columns;
        Span<double> along = _along[..count];
        for (int member = 0; member < count; member++)
        {
            along[member] = 0;
            for (int c = 0; c < _columns; c++)
                along[member] += beta[c] * members[(member * _columns) + c];
        }

        double tilt = Tilt(along, chosen);
        _probability[..(chosen + 1)].Clear();
        _means[..((chosen + 1) * _columns)].Clear();
        _covariances[..((chosen + 1) * _columns * _columns)].Clear();
        _probability[0] = 1;
        double logs = chosen * tilt, product = 1;
        for (int member = 0; member < count; member++)
        {
            double z = along[member] - tilt;
            double small = Exponential.Of(-Math.Abs(z));
            double near = 1 / (1 + small), far = small * near;
            logs += Math.Max(0, z);
            product *= 1 + small;
            if (product > ProductBeforeLogging)
            {
                logs += NaturalLogarithm.Of(product);
                product = 1;
            }

            int fewest = Math.Max(1, chosen - (count - 1 - member));
            for (int successes = Math.Min(member + 1, chosen); successes >= fewest; successes--)
                Step(successes, z >= 0 ? near : far, z >= 0 ? far : near, members.Slice(member * _columns, _columns));
            _probability[0] *= z >= 0 ? far : near;
        }

        return logs + NaturalLogarithm.Of(product) + NaturalLogarithm.Of(_probability[chosen]);
    }

    private void Step(int successes, double taken, double left, ReadOnlySpan<double> member)
    {
        double stay = left * _probability[successes];
        double come = taken * _probability[successes - 1];
        double total = stay + come;
        if (total == 0)
            return;
        _probability[successes] = total;
        double share = come / total;
        double spread = share * (stay / total);
        int columns = _columns;
        Span<double> mean = _means.Slice(successes * columns, columns);
        ReadOnlySpan<double> meanBefore = _means.Slice((successes - 1) * columns, columns);
        Span<double> covariance = _covariances.Slice(successes * columns * columns, columns * columns);
        ReadOnlySpan<double> covarianceBefore = _covariances.Slice((successes - 1) * columns * columns, columns * columns);
        for (int row = 0; row < columns; row++)
        {
            double step = meanBefore[row] + member[row] - mean[row];
            for (int column = 0; column <= row; column++)
            {
                int entry = (row * columns) + column;
                double other = meanBefore[column] + member[column] - mean[column];
                covariance[entry] += (share * (covarianceBefore[entry] - covariance[entry])) + (spread * step * other);
            }
        }

        for (int row = 0; row < columns; row++)
            mean[row] += share * (meanBefore[row] + member[row] - mean[row]);
    }

    // The tilt at which about the wanted number of members is expected; Newton's method kept inside a bracket.
    private static double Tilt(ReadOnlySpan<double> along, int wanted)
    {
        double smallest = along[0], largest = along[0];
        foreach (double value in along)
        {
            smallest = Math.Min(smallest, value);
            largest = Math.Max(largest, value);
        }

        double ifAllEqual = NaturalLogarithm.Of((double)(along.Length - wanted) / wanted);
        double low = smallest + ifAllEqual, high = largest + ifAllEqual, tilt = (low + high) / 2;
        if (along.Length * (((high - low) / 2) + Math.Abs(ifAllEqual) + 1) <= HarmlessTilt)
            return tilt;
        for (int step = 0; step < MostTiltSteps; step++)
        {
            double expected = 0, slope = 0;
            foreach (double value in along)
            {
                double small = Exponential.Of(-Math.Abs(value - tilt));
                double near = 1 / (1 + small);
                expected += value >= tilt ? near : small * near;
                slope += small * near * near;
            }

            if (Math.Abs(expected - wanted) <= CloseEnough)
                break;
            if (expected > wanted)
                low = tilt;
            else
                high = tilt;
            double next = tilt + ((expected - wanted) / slope);
            tilt = next > low && next < high ? next : (low + high) / 2;
        }

        return tilt;
    }
}
