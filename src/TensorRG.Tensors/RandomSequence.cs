namespace TensorRG.Tensors;

/// <summary>
/// A short, fixed stream of pseudo-random numbers (SplitMix64: G. Steele, D. Lea, C. Flood, OOPSLA 2014). Unlike the
/// runtime's generators its values are part of this project's promise of identical bits, on every platform and version.
/// </summary>
/// <param name="seed">The user's seed.</param>
/// <param name="purpose">Further numbers that set this stream apart, such as the step and the decomposition within it.</param>
public sealed class RandomSequence(long seed, params ReadOnlySpan<int> purpose)
{
    private const ulong Increment = 0x9E3779B97F4A7C15;

    private ulong _state = Start(seed, purpose);

    /// <summary>The next number, uniform in (-sqrt 3, sqrt 3): mean 0, variance 1.</summary>
    public double NextUnit()
    {
        _state += Increment;
        double fraction = ((Mix(_state) >> 11) + 0.5) * (1.0 / (1UL << 53));
        return Math.Sqrt(3) * ((2 * fraction) - 1);
    }

    private static ulong Start(long seed, ReadOnlySpan<int> purpose)
    {
        ulong state = Mix((ulong)seed + Increment);
        foreach (int part in purpose)
            state = Mix(state + Increment + (ulong)(uint)part);
        return state;
    }

    private static ulong Mix(ulong z)
    {
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
