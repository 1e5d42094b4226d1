namespace MatchedSuite.Statistics;

/// <summary>Working memory that one thread reuses from endpoint to endpoint, so that methods allocate nothing.</summary>
/// <remarks>
/// Spans are handed out from a stack: open a frame, take spans, and close the frame to give them all back.
/// <code>using var frame = scratch.Open(); Span&lt;double&gt; ranks = frame.Doubles(n);</code>
/// Contents are not cleared. Not safe for use by two threads at once.
/// </remarks>
public sealed class Scratch
{
    private readonly Stack<double> _doubles = new();
    private readonly Stack<int> _integers = new();
    private readonly Stack<long> _longs = new();

    /// <summary>Opens a frame; every span taken from it is given back when it is disposed.</summary>
    public Frame Open() => new(this);

    /// <summary>One method's share of the working memory.</summary>
    public readonly ref struct Frame
    {
        private readonly Scratch _owner;
        private readonly (int Chunk, int Used) _doubles;
        private readonly (int Chunk, int Used) _integers;
        private readonly (int Chunk, int Used) _longs;

        internal Frame(Scratch owner)
        {
            _owner = owner;
            _doubles = owner._doubles.Position;
            _integers = owner._integers.Position;
            _longs = owner._longs.Position;
        }

        /// <summary>A span of <paramref name="length"/> doubles with arbitrary contents.</summary>
        public Span<double> Doubles(int length) => _owner._doubles.Take(length);

        /// <summary>A span of <paramref name="length"/> integers with arbitrary contents.</summary>
        public Span<int> Integers(int length) => _owner._integers.Take(length);

        /// <summary>A span of <paramref name="length"/> long integers with arbitrary contents.</summary>
        public Span<long> Longs(int length) => _owner._longs.Take(length);

        /// <summary>Gives every span of this frame back.</summary>
        public void Dispose()
        {
            _owner._doubles.Position = _doubles;
            _owner._integers.Position = _integers;
            _owner._longs.Position = _longs;
        }
    }

    // Chunks never move once handed out, so spans stay valid while the stack grows.
    private sealed class Stack<T>
    {
        private const int FirstChunk = 4096;
        private readonly List<T[]> _chunks = [new T[FirstChunk]];

        public (int Chunk, int Used) Position { get; set; }

        public Span<T> Take(int length)
        {
            var (chunk, used) = Position;
            while (used + length > _chunks[chunk].Length)
            {
                if (chunk + 1 == _chunks.Count)
                    _chunks.Add(new T[Math.Max(length, 2 * _chunks[chunk].Length)]);
                chunk++;
                used = 0;
            }

            Position = (chunk, used + length);
            return _chunks[chunk].AsSpan(used, length);
        }
    }
}
