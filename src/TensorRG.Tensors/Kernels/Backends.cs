using System.Collections.Concurrent;
using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>The backends by name. <see cref="Default"/> needs nothing installed; native ones are looked for at run time.</summary>
public static class Backends
{
    /// <summary>The backend to use unless told otherwise.</summary>
    public const string Default = "managed";

    private static readonly Dictionary<string, Func<int, SimdPath?, Backend>> Makers = new(StringComparer.Ordinal)
    {
        [Default] = Managed,
        ["plain"] = static (_, _) => new Backend(
            "plain", "textbook loops, one thread", new PlainKernels<double>(), new PlainKernels<Complex>()),
        ["openblas"] = static (threads, _) => OpenBlas(threads),
        ["mathnet"] = static (threads, _) => MathNetProvider.CreateManaged(threads),
        ["mkl"] = static (threads, _) => MathNetProvider.CreateMkl(threads),
    };

    // Teams are shared by size: a busy team makes a second caller work alone, it never mixes results up.
    private static readonly ConcurrentDictionary<int, Lazy<Workers>> Teams = new();

    /// <summary>All names, available or not.</summary>
    public static IReadOnlyList<string> Names { get; } = [.. Makers.Keys];

    /// <summary>Makes a backend.</summary>
    /// <param name="name">One of <see cref="Names"/>.</param>
    /// <param name="threads">Threads for large problems, at least 1. <c>plain</c> ignores it.</param>
    /// <param name="simdPath">Instruction path of <c>managed</c>; null for the environment's or the CPU's. Others ignore it.</param>
    /// <exception cref="ArgumentException">The name is unknown.</exception>
    /// <exception cref="ArgumentOutOfRangeException">Fewer than one thread.</exception>
    /// <exception cref="BackendUnavailableException">The library behind the name is missing.</exception>
    public static Backend Create(string name, int threads, SimdPath? simdPath = null)
    {
        ArgumentNullException.ThrowIfNull(name);
        ArgumentOutOfRangeException.ThrowIfLessThan(threads, 1);
        if (!Makers.TryGetValue(name, out Func<int, SimdPath?, Backend>? make))
            throw new ArgumentException($"Unknown backend '{name}'; use one of {string.Join(", ", Names)}.", nameof(name));
        return make(threads, simdPath);
    }

    /// <summary>Every backend with its state on this machine, in the order of <see cref="Names"/>.</summary>
    public static IReadOnlyList<BackendStatus> Available()
    {
        // Looking must not change what Math.NET runs on.
        using (MathNetProvider.KeepSettings())
            return [.. Names.Select(Probe)];
    }

    private static BackendStatus Probe(string name)
    {
        try
        {
            return new BackendStatus(name, true, Create(name, 1).Description);
        }
        catch (BackendUnavailableException e)
        {
            return new BackendStatus(name, false, e.Message);
        }
    }

    private static Backend Managed(int threads, SimdPath? simdPath)
    {
        SimdPath path = simdPath ?? SimdPaths.FromEnvironment();
        Workers team = Teams.GetOrAdd(threads, static n => new Lazy<Workers>(() => new Workers(n))).Value;
        string description = FormattableString.Invariant($"managed SIMD kernels, {SimdPaths.Name(path)}, {threads} thread(s)");
        return new Backend(Default, description, new ManagedKernels<double>(team, path), new ManagedKernels<Complex>(team, path));
    }

    private static Backend OpenBlas(int threads)
    {
        OpenBlasLibrary library = OpenBlasLibrary.Load();
        string description = FormattableString.Invariant($"{library.Configuration}, {threads} thread(s)");
        return new Backend(
            "openblas", description, new OpenBlasKernels<double>(library, threads), new OpenBlasKernels<Complex>(library, threads));
    }
}
