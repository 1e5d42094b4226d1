using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Memory that begins at a cache line, so that a row of sixteen numbers never lies across two.</summary>
/// <remarks>Tables in ordinary arrays begin 16 bytes into a line: every lookup then reads two lines and takes twice as long.</remarks>
internal sealed class CacheAligned<T>
    where T : unmanaged
{
    private const int Line = 64;

    private readonly T[] _memory;
    private readonly int _start;

    /// <summary>Room for <paramref name="length"/> numbers, all zero.</summary>
    public CacheAligned(int length)
    {
        int size = Unsafe.SizeOf<T>();
        _memory = GC.AllocateArray<T>(length + Line / size, pinned: true);
        long address = Marshal.UnsafeAddrOfPinnedArrayElement(_memory, 0);
        _start = (int)((Line - address % Line) % Line) / size;
        Length = length;
    }

    /// <summary>How many numbers.</summary>
    public int Length { get; }

    /// <summary>All of them.</summary>
    public Span<T> Span => _memory.AsSpan(_start, Length);

    /// <summary>The number at <paramref name="index"/>.</summary>
    public ref T this[int index] => ref _memory[_start + index];
}
