using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>Random numbers for invented data: each is a function of the seed, a stream and a position, so no order matters.</summary>
internal sealed class InventedNumbers(long seed)
{
    /// <summary>A uniform number in (0, 1).</summary>
    public double Uniform(long stream, long position) =>
        Math.Max(CounterRandom.Uniform(seed, RandomPurpose.Invention, stream, position), double.Epsilon);

    /// <summary>A standard normal number.</summary>
    public double Normal(long stream, long position) => StandardNormal.UpperQuantile(Uniform(stream, position));
}
