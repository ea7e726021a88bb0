using System.Numerics;
using MathNet.Numerics;
using MathNet.Numerics.Providers.LinearAlgebra;

namespace TensorRG.Tensors.Kernels;

/// <summary>The two providers of Math.NET. Its choice of provider and threads is one for the whole process.</summary>
internal static class MathNetProvider
{
    /// <summary>The managed provider: slow, independent of our own kernels, hence an oracle.</summary>
    public static Backend CreateManaged(int threads)
    {
        Control.UseManaged();
        Control.MaxDegreeOfParallelism = threads;
        return Wrap("mathnet", FormattableString.Invariant($"Math.NET Numerics, managed provider, {threads} thread(s)"));
    }

    /// <summary>Intel MKL through Math.NET, when the user has put its provider package beside the program.</summary>
    /// <exception cref="BackendUnavailableException">The provider or its native library is missing.</exception>
    public static Backend CreateMkl(int threads)
    {
        if (!Control.TryUseNativeMKL())
        {
            throw new BackendUnavailableException(
                "Intel MKL was not found. Put MathNet.Numerics.Providers.MKL.dll and the native library of the package "
                + "MathNet.Numerics.MKL for this platform beside the program, or use the default backend, which needs no library.");
        }

        Control.MaxDegreeOfParallelism = threads;
        return Wrap("mkl", FormattableString.Invariant($"Math.NET Numerics, {LinearAlgebraControl.Provider}, {threads} thread(s)"));
    }

    private static Backend Wrap(string name, string description)
        => new(name, description, new MathNetKernels<double>(), new MathNetKernels<Complex>());

    /// <summary>Restores Math.NET's provider and number of threads on disposal.</summary>
    public static IDisposable KeepSettings() => new Settings();

    private sealed class Settings : IDisposable
    {
        private readonly ILinearAlgebraProvider _provider = LinearAlgebraControl.Provider;
        private readonly int _threads = Control.MaxDegreeOfParallelism;

        public void Dispose()
        {
            LinearAlgebraControl.Provider = _provider;
            Control.MaxDegreeOfParallelism = _threads;
        }
    }
}
