using System.Runtime.InteropServices;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// OpenBLAS found at run time, through its Fortran symbols: every argument by address, matrices by columns, and the
/// lengths of character arguments, all one, at the end.
/// </summary>
internal sealed unsafe class OpenBlasLibrary
{
    private static readonly string[] FileNames =
    [
        "libopenblas.so.0", "libopenblas.so", "libopenblas.dylib", "/opt/homebrew/opt/openblas/lib/libopenblas.dylib",
        "/usr/local/opt/openblas/lib/libopenblas.dylib", "libopenblas.dll", "openblas.dll",
    ];

    private static readonly Lazy<OpenBlasLibrary?> Found = new(Find);

    private readonly nint _handle;
    private readonly delegate* unmanaged[Cdecl]<int, void> _setThreads;
    private int _threads;

    private OpenBlasLibrary(nint handle)
    {
        _handle = handle;
        if (NativeLibrary.TryGetExport(handle, "openblas_set_num_threads", out nint setThreads))
            _setThreads = (delegate* unmanaged[Cdecl]<int, void>)setThreads;
        if (NativeLibrary.TryGetExport(handle, "openblas_get_config", out nint config))
            Configuration = Marshal.PtrToStringUTF8((nint)((delegate* unmanaged[Cdecl]<byte*>)config)())?.Trim() ?? Configuration;
    }

    /// <summary>Version, build options and CPU core in use, as the library states them.</summary>
    public string Configuration { get; } = "OpenBLAS";

    /// <summary>The library.</summary>
    /// <exception cref="BackendUnavailableException">It is not installed.</exception>
    public static OpenBlasLibrary Load() => Found.Value ?? throw new BackendUnavailableException(
        "OpenBLAS was not found (libopenblas.so.0). Install it, on Debian or Ubuntu: apt-get install libopenblas0-pthread; "
        + "or use the default backend, which needs no library.");

    /// <summary>The address of a routine.</summary>
    /// <exception cref="BackendUnavailableException">The library was built without it.</exception>
    public nint Symbol(string name)
    {
        if (NativeLibrary.TryGetExport(_handle, name, out nint address))
            return address;
        throw new BackendUnavailableException(
            $"OpenBLAS here lacks the routine {name}: it was built without LAPACK or with other symbol names. "
            + "Install a standard build, on Debian or Ubuntu: apt-get install libopenblas0-pthread.");
    }

    /// <summary>Sets the number of threads of the calls to come. The setting is one for the whole process.</summary>
    public void UseThreads(int threads)
    {
        if (_setThreads is null || Interlocked.Exchange(ref _threads, threads) == threads)
            return;
        _setThreads(threads);
    }

    private static OpenBlasLibrary? Find()
    {
        foreach (string name in FileNames)
        {
            if (NativeLibrary.TryLoad(name, out nint handle))
                return new OpenBlasLibrary(handle);
        }

        return null;
    }
}
