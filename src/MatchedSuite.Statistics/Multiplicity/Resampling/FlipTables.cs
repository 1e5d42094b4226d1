using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Signed sums of sixteen endpoints under many flips, by tabulating every sign pattern of six sets at a time.</summary>
/// <remarks>
/// Where a product of a sign matrix with the differences costs one addition a set, a lookup covers six sets, after Arlazarov,
/// Dinic, Kronrod and Faradžev (1970), Soviet Math Dokl 11, 1209-1210 ("four Russians"). Whole numbers make the sums exact, so
/// neither grouping nor vector width can change them.
/// </remarks>
internal sealed class FlipTables
{
    // Sets whose signed sums are tabulated together. A table of 4 KiB costs little to build beside some thousand lookups, and the
    // tables of two hundred sets stay in a second-level cache beside the flips.
    private const int GroupSets = 6;
    private const int Patterns = 1 << GroupSets;
    private const int Row = Lanes.Endpoints;
    private const int Table = Patterns * Row;

    // Lookups written out one after the other, and tables that one pass over the flips reads: a quarter of a megabyte.
    private const int Unrolled = 8;
    private const int Pass = 64;

    private readonly int _groups;
    private readonly CacheAligned<int> _tables;
    private readonly CacheAligned<int> _sums;
    private readonly ushort[] _offsets;
    private readonly ulong[] _flip;

    /// <summary>Room for a block of flips.</summary>
    /// <param name="sets">Number of sets.</param>
    /// <param name="capacity">Most flips in the block.</param>
    /// <param name="strip">Most flips that are summed at once.</param>
    public FlipTables(int sets, int capacity, int strip)
    {
        _groups = (sets + GroupSets - 1) / GroupSets;
        _tables = new CacheAligned<int>(_groups * Table);
        _sums = new CacheAligned<int>(strip * Row);
        _offsets = new ushort[_groups * capacity];
        _flip = new ulong[(sets + 63) / 64 + 1];
    }

    /// <summary>Takes the sign patterns of a block of flips.</summary>
    public void TakeFlips(ISignPatterns flips, int first, int count)
    {
        for (int flip = 0; flip < count; flip++)
        {
            flips.Fill(first + flip, _flip);
            var offsets = _offsets.AsSpan(flip * _groups, _groups);
            for (int group = 0; group < offsets.Length; group++)
                offsets[group] = (ushort)(Pattern(group * GroupSets) * Row);
        }
    }

    /// <summary>Takes the whole-number differences of one tile, sixteen lanes a set.</summary>
    public void TakeTile(ReadOnlySpan<int> values)
    {
        for (int group = 0; group < _groups; group++)
        {
            int first = group * GroupSets * Row;
            Tabulate(values.Slice(first, Math.Min(GroupSets * Row, values.Length - first)), _tables.Span.Slice(group * Table, Table));
        }
    }

    /// <summary>Sums of the tile under consecutive flips of the block: sixteen lanes a flip.</summary>
    /// <param name="first">The first flip, counted from the block's.</param>
    /// <param name="count">How many, at most a strip.</param>
    public ReadOnlySpan<int> Sums(int first, int count)
    {
        var sums = _sums.Span[..(count * Row)];
        sums.Clear();
        for (int group = 0; group < _groups; group += Pass)
            AddLookups(group, Math.Min(Pass, _groups - group), first, count);
        return sums;
    }

    // The last word is followed by a spare one, so that a pattern may straddle words.
    private ulong Pattern(int firstSet)
    {
        int word = firstSet >> 6;
        int shift = firstSet & 63;
        ulong bits = _flip[word] >> shift;
        if (shift > 64 - GroupSets)
            bits |= _flip[word + 1] << (64 - shift);
        return bits & (Patterns - 1);
    }

    // A pattern with one more sign changed loses that difference twice; wrapping does no harm, the total is in range.
    private static void Tabulate(ReadOnlySpan<int> values, Span<int> table)
    {
        var all = Vector512<int>.Zero;
        for (int at = 0; at < values.Length; at += Row)
            all += Vector512.Create(values.Slice(at, Row));
        all.CopyTo(table);
        for (int set = 0; set < GroupSets; set++)
        {
            int half = Row << set;
            var value = set * Row < values.Length ? Vector512.Create(values.Slice(set * Row, Row)) : Vector512<int>.Zero;
            for (int at = 0; at < half; at += Row)
                (Vector512.Create(table.Slice(at, Row)) - value - value).CopyTo(table.Slice(half + at, Row));
        }
    }

    // References instead of spans: a lookup is two instructions, and a bounds check would double it. Every offset is a row of
    // its table by construction, and there is one for each group of each flip.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddLookups(int group, int groups, int first, int count)
    {
        ref int sum = ref _sums[0];
        ref ushort offsets = ref _offsets[first * _groups + group];
        for (int flip = 0; flip < count; flip++)
        {
            ref int table = ref _tables[group * Table];
            ref ushort offset = ref offsets;
            var total = Vector512.LoadUnsafe(ref sum);
            int left = groups;
            for (; left >= Unrolled; left -= Unrolled)
            {
                total = total
                    + Vector512.LoadUnsafe(ref table, offset)
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, Table), Unsafe.Add(ref offset, 1))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 2 * Table), Unsafe.Add(ref offset, 2))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 3 * Table), Unsafe.Add(ref offset, 3))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 4 * Table), Unsafe.Add(ref offset, 4))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 5 * Table), Unsafe.Add(ref offset, 5))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 6 * Table), Unsafe.Add(ref offset, 6))
                    + Vector512.LoadUnsafe(ref Unsafe.Add(ref table, 7 * Table), Unsafe.Add(ref offset, 7));
                table = ref Unsafe.Add(ref table, Unrolled * Table);
                offset = ref Unsafe.Add(ref offset, Unrolled);
            }

            for (; left > 0; left--)
            {
                total += Vector512.LoadUnsafe(ref table, offset);
                table = ref Unsafe.Add(ref table, Table);
                offset = ref Unsafe.Add(ref offset, 1);
            }

            total.StoreUnsafe(ref sum);
            sum = ref Unsafe.Add(ref sum, Row);
            offsets = ref Unsafe.Add(ref offsets, _groups);
        }
    }
}
