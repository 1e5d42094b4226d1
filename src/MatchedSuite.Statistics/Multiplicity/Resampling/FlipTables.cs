using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
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
    // Tables that a pass reads together; with 4 KiB each they stay in the first-level cache while the flips stream past.
    private const int Pass = 8;
    private const int Row = Lanes.Endpoints;
    private const int Table = Lanes.Patterns * Row;

    private readonly int _groups;
    private readonly int[] _tables;
    private readonly ushort[] _offsets;
    private readonly ulong[] _flip;
    private readonly int[] _sums;

    /// <summary>Room for a block of flips.</summary>
    /// <param name="sets">Number of sets.</param>
    /// <param name="capacity">Most flips in a block.</param>
    /// <param name="flips">The flips.</param>
    public FlipTables(int sets, int capacity, SignFlips flips)
    {
        _groups = Lanes.Groups(sets);
        _tables = new int[_groups * Table];
        _offsets = new ushort[_groups * capacity];
        _sums = new int[capacity * Row];
        _flip = new ulong[flips.Words + 1];
    }

    /// <summary>Takes the sign patterns of a block of flips.</summary>
    public void TakeFlips(SignFlips flips, int first, int count)
    {
        for (int flip = 0; flip < count; flip++)
        {
            flips.Fill(first + flip, _flip);
            var offsets = _offsets.AsSpan(flip * _groups, _groups);
            for (int group = 0; group < offsets.Length; group++)
                offsets[group] = (ushort)(Pattern(group * Lanes.GroupSets) * Row);
        }
    }

    /// <summary>Sums of one tile under each flip of the block: sixteen lanes a flip.</summary>
    /// <param name="values">Whole-number differences of the tile, sixteen lanes a set.</param>
    /// <param name="count">Flips of the block.</param>
    public ReadOnlySpan<int> Sums(ReadOnlySpan<int> values, int count)
    {
        for (int group = 0; group < _groups; group++)
        {
            int first = group * Lanes.GroupSets * Row;
            Tabulate(values.Slice(first, Math.Min(Lanes.GroupSets * Row, values.Length - first)), _tables.AsSpan(group * Table, Table));
        }

        var sums = _sums.AsSpan(0, count * Row);
        sums.Clear();
        int done = 0;
        for (; done + Pass <= _groups; done += Pass)
            AddEight(done, sums);
        for (; done < _groups; done++)
            AddOne(done, sums);
        return sums;
    }

    // The last word is followed by a spare one, so that a pattern may straddle words.
    private ulong Pattern(int firstSet)
    {
        int word = firstSet >> 6;
        int shift = firstSet & 63;
        ulong bits = _flip[word] >> shift;
        if (shift > 64 - Lanes.GroupSets)
            bits |= _flip[word + 1] << (64 - shift);
        return bits & (Lanes.Patterns - 1);
    }

    // A pattern with one more sign changed loses that difference twice; wrapping does no harm, the total is in range.
    private static void Tabulate(ReadOnlySpan<int> values, Span<int> table)
    {
        var all = Vector512<int>.Zero;
        for (int at = 0; at < values.Length; at += Row)
            all += Vector512.Create(values.Slice(at, Row));
        all.CopyTo(table);
        for (int pattern = 1; pattern < Lanes.Patterns; pattern++)
        {
            int changed = BitOperations.TrailingZeroCount(pattern) * Row;
            var before = Vector512.Create(table.Slice((pattern & (pattern - 1)) * Row, Row));
            var value = changed < values.Length ? Vector512.Create(values.Slice(changed, Row)) : Vector512<int>.Zero;
            (before - value - value).CopyTo(table.Slice(pattern * Row, Row));
        }
    }

    // References instead of spans: eight lookups a flip leave no room for bounds checks. Offsets are below the table length by
    // construction, and there is one for every group of every flip.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void AddEight(int group, Span<int> sums)
    {
        ref int table = ref _tables[group * Table];
        ref ushort offsets = ref _offsets[group];
        ref int sum = ref MemoryMarshal.GetReference(sums);
        for (int at = 0; at < sums.Length; at += Row)
        {
            var total = Vector512.LoadUnsafe(ref sum)
                + Vector512.LoadUnsafe(ref table, offsets)
                + Vector512.LoadUnsafe(ref table, (nuint)Table + Unsafe.Add(ref offsets, 1))
                + Vector512.LoadUnsafe(ref table, (nuint)(2 * Table) + Unsafe.Add(ref offsets, 2))
                + Vector512.LoadUnsafe(ref table, (nuint)(3 * Table) + Unsafe.Add(ref offsets, 3))
                + Vector512.LoadUnsafe(ref table, (nuint)(4 * Table) + Unsafe.Add(ref offsets, 4))
                + Vector512.LoadUnsafe(ref table, (nuint)(5 * Table) + Unsafe.Add(ref offsets, 5))
                + Vector512.LoadUnsafe(ref table, (nuint)(6 * Table) + Unsafe.Add(ref offsets, 6))
                + Vector512.LoadUnsafe(ref table, (nuint)(7 * Table) + Unsafe.Add(ref offsets, 7));
            total.StoreUnsafe(ref sum);
            sum = ref Unsafe.Add(ref sum, Row);
            offsets = ref Unsafe.Add(ref offsets, _groups);
        }
    }

    private void AddOne(int group, Span<int> sums)
    {
        var table = _tables.AsSpan(group * Table, Table);
        for (int at = 0, flip = group; at < sums.Length; at += Row, flip += _groups)
            (Vector512.Create(sums.Slice(at, Row)) + Vector512.Create(table.Slice(_offsets[flip], Row))).CopyTo(sums[at..]);
    }
}
