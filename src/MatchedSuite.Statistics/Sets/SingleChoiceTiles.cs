namespace MatchedSuite.Statistics.Sets;

/// <summary>Sets in which one role has a single member, laid out four abreast.</summary>
/// <remarks>
/// <para>In a set the member alone in its role is the chosen one. D is the column value of another member minus that of the
/// chosen one, its sign turned where the chosen one is the reference, so that β·D is a member's lead over the chosen one.</para>
/// <para>Sets with equally many others stand together, four to a tile, one a lane; in a tile the others follow one another, each
/// with its columns. Empty lanes of a last tile hold D = 0.</para>
/// </remarks>
internal readonly ref struct SingleChoiceTiles
{
    /// <summary>Sets in a tile.</summary>
    public const int Lanes = 4;

    private SingleChoiceTiles(ReadOnlySpan<double> tiles, ReadOnlySpan<int> setsByOthers, int columns)
    {
        Tiles = tiles;
        SetsByOthers = setsByOthers;
        Columns = columns;
    }

    /// <summary>All tiles, those of sets with fewest others first.</summary>
    public ReadOnlySpan<double> Tiles { get; }

    /// <summary>How many sets have as many others as the entry's position says.</summary>
    public ReadOnlySpan<int> SetsByOthers { get; }

    /// <summary>Number of columns.</summary>
    public int Columns { get; }

    /// <summary>True for a set that this form can take.</summary>
    public static bool Takes(int members, int index) => index == 1 || members - index == 1;

    /// <summary>Tiles needed for so many sets.</summary>
    public static int TilesOf(int sets) => (sets + Lanes - 1) / Lanes;

    /// <summary>Lays the sets out.</summary>
    /// <param name="sets">The sets; those it does not take are passed over.</param>
    /// <param name="design">Columns one after another, one value a member.</param>
    /// <param name="columns">Number of columns.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    public static SingleChoiceTiles Of(in SetSample sets, ReadOnlySpan<double> design, int columns, in Scratch.Frame frame)
    {
        ReadOnlySpan<int> starts = sets.Starts;
        int largest = 0;
        for (int s = 0; s < sets.Sets; s++)
            largest = Math.Max(largest, OthersIn(sets, s));
        Span<int> setsByOthers = frame.Integers(largest + 1);
        setsByOthers.Clear();
        for (int s = 0; s < sets.Sets; s++)
            setsByOthers[OthersIn(sets, s)]++;
        setsByOthers[0] = 0;

        Span<int> places = frame.Integers(largest + 1);
        int length = 0;
        for (int others = 1; others <= largest; others++)
        {
            places[others] = length;
            length += TilesOf(setsByOthers[others]) * others * columns * Lanes;
        }

        Span<double> tiles = frame.Doubles(length);
        for (int others = 1; others <= largest; others++)
        {
            if (setsByOthers[others] % Lanes != 0)
                tiles.Slice(places[others] + setsByOthers[others] / Lanes * others * columns * Lanes, others * columns * Lanes).Clear();
        }

        Span<int> filled = frame.Integers(largest + 1);
        filled.Clear();
        for (int s = 0; s < sets.Sets; s++)
        {
            int others = OthersIn(sets, s);
            if (others == 0)
                continue;
            int slot = filled[others]++;
            int at = places[others] + (slot / Lanes * others * columns * Lanes) + (slot % Lanes);
            bool indexIsAlone = sets.IndexCounts[s] == 1;
            Place(tiles[at..], design, columns, sets.Members, starts[s], starts[s + 1], indexIsAlone);
        }

        return new SingleChoiceTiles(tiles, setsByOthers, columns);
    }

    /// <summary>Whether the chosen members lead along a direction; see <see cref="ConditionalLikelihood.NeverFallsAlong"/>.</summary>
    public (bool NeverBehind, bool SomewhereAhead) LeadAlong(ReadOnlySpan<double> direction, ReadOnlySpan<double> tolerances)
    {
        bool ahead = false;
        int stride = Columns * Lanes;
        for (int at = 0; at < Tiles.Length; at += stride)
        {
            for (int lane = 0; lane < Lanes; lane++)
            {
                double along = 0, level = 0;
                for (int c = 0; c < Columns; c++)
                {
                    double difference = Tiles[at + (c * Lanes) + lane];
                    along += direction[c] * difference;
                    level += tolerances[c] * Math.Abs(difference);
                }

                if (along > level)
                    return (false, ahead);
                ahead |= along < -level;
            }
        }

        return (true, ahead);
    }

    /// <summary>The log-likelihood of a single column at infinity; see <see cref="ConditionalLikelihood.LimitAlong"/>.</summary>
    public double LimitAlong(double direction)
    {
        double logLikelihood = 0;
        ReadOnlySpan<double> rest = Tiles;
        for (int others = 1; others < SetsByOthers.Length; others++)
        {
            for (int set = 0; set < SetsByOthers[others]; set++)
            {
                int level = 1, at = (set / Lanes * others * Lanes) + (set % Lanes);
                for (int other = 0; other < others; other++)
                    level += direction * rest[at + (other * Lanes)] == 0 ? 1 : 0;
                logLikelihood -= NaturalLogarithm.Of(level);
            }

            rest = rest[(TilesOf(SetsByOthers[others]) * others * Lanes)..];
        }

        return logLikelihood;
    }

    private static int OthersIn(in SetSample sets, int set)
    {
        int members = sets.Starts[set + 1] - sets.Starts[set];
        return Takes(members, sets.IndexCounts[set]) ? members - 1 : 0;
    }

    private static void Place(
        Span<double> target, ReadOnlySpan<double> design, int columns, int members, int from, int to, bool indexIsAlone)
    {
        int chosen = indexIsAlone ? from : to - 1;
        int first = indexIsAlone ? from + 1 : from;
        int others = to - from - 1;
        double sign = indexIsAlone ? 1 : -1;
        for (int c = 0; c < columns; c++)
        {
            ReadOnlySpan<double> column = design.Slice(c * members, members);
            double origin = column[chosen];
            for (int other = 0; other < others; other++)
                target[((other * columns) + c) * Lanes] = sign * (column[first + other] - origin);
        }
    }
}
