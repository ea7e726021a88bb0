using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace TensorRG.Tensors.Kernels;

/// <summary>Detection of the instruction path and the setting that forces one.</summary>
public static class SimdPaths
{
    /// <summary>The environment variable that forces a path: <c>avx512</c>, <c>avx2</c> or <c>portable</c>.</summary>
    public const string Variable = "TENSORRG_SIMD";

    /// <summary>The fastest path this CPU runs in hardware.</summary>
    public static SimdPath Best
    {
        get
        {
            if (IsSupported(SimdPath.Avx512))
                return SimdPath.Avx512;
            return IsSupported(SimdPath.Avx2) ? SimdPath.Avx2 : SimdPath.Portable;
        }
    }

    /// <summary>Whether this CPU runs the path in hardware. Elsewhere it still computes the same bits, slowly.</summary>
    /// <param name="path">The path.</param>
    public static bool IsSupported(SimdPath path) => path switch
    {
        SimdPath.Avx512 => Vector512.IsHardwareAccelerated && Avx512F.IsSupported,
        SimdPath.Avx2 => Avx2.IsSupported && Fma.IsSupported,
        _ => true,
    };

    /// <summary>The path forced by <see cref="Variable"/>, or <see cref="Best"/> when it is unset or empty.</summary>
    /// <exception cref="ArgumentException">The variable names an unknown path or one this CPU lacks.</exception>
    public static SimdPath FromEnvironment() => Select(Environment.GetEnvironmentVariable(Variable));

    /// <summary>The path a setting names, or <see cref="Best"/> when it is null or empty. Case does not matter.</summary>
    /// <param name="setting"><c>avx512</c>, <c>avx2</c>, <c>portable</c>, empty or null.</param>
    /// <exception cref="ArgumentException">The setting is unknown or this CPU lacks the path.</exception>
    public static SimdPath Select(string? setting)
    {
        if (string.IsNullOrWhiteSpace(setting))
            return Best;
        SimdPath path = setting.Trim().ToUpperInvariant() switch
        {
            "AVX512" => SimdPath.Avx512,
            "AVX2" => SimdPath.Avx2,
            "PORTABLE" => SimdPath.Portable,
            _ => throw new ArgumentException($"{Variable}={setting} is not known; use avx512, avx2 or portable, or unset it."),
        };
        if (!IsSupported(path))
            throw new ArgumentException($"{Variable}={setting}: this CPU does not have it; unset the variable to use {Name(Best)}.");
        return path;
    }

    /// <summary>The name used in settings and records: <c>avx512</c>, <c>avx2</c> or <c>portable</c>.</summary>
    /// <param name="path">The path.</param>
    public static string Name(SimdPath path) => path switch
    {
        SimdPath.Avx512 => "avx512",
        SimdPath.Avx2 => "avx2",
        _ => "portable",
    };
}
