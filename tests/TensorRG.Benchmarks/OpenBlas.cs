using System.Runtime.InteropServices;

namespace TensorRG.Benchmarks;

/// <summary>The matrix product of OpenBLAS, found at run time, as the yardstick.</summary>
internal sealed unsafe class OpenBlas
{
    private static readonly string[] Names =
        ["libopenblas.so.0", "/usr/lib/x86_64-linux-gnu/openblas-pthread/libopenblas.so.0", "libopenblas.dylib", "libopenblas.dll"];

    private readonly delegate* unmanaged[Cdecl]<int, void> _setThreads;
    private readonly delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, double*, double*, int*, double*, int*, double*, double*, int*, void> _dgemm;
    private readonly delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, double*, double*, int*, double*, int*, double*, double*, int*, void> _zgemm;

    private OpenBlas(nint library)
    {
        _setThreads = (delegate* unmanaged[Cdecl]<int, void>)NativeLibrary.GetExport(library, "openblas_set_num_threads");
        _dgemm = (delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, double*, double*, int*, double*, int*, double*, double*, int*, void>)
            NativeLibrary.GetExport(library, "dgemm_");
        _zgemm = (delegate* unmanaged[Cdecl]<byte*, byte*, int*, int*, int*, double*, double*, int*, double*, int*, double*, double*, int*, void>)
            NativeLibrary.GetExport(library, "zgemm_");
        var configuration = (delegate* unmanaged[Cdecl]<byte*>)NativeLibrary.GetExport(library, "openblas_get_config");
        Description = Marshal.PtrToStringUTF8((nint)configuration()) ?? "OpenBLAS";
    }

    public string Description { get; }

    /// <summary>The library, or null when it is not installed.</summary>
    public static OpenBlas? Find()
    {
        foreach (string name in Names)
        {
            if (NativeLibrary.TryLoad(name, out nint library))
                return new OpenBlas(library);
        }

        return null;
    }

    public void SetThreads(int threads) => _setThreads(threads);

    /// <summary>Row-major C (m x n) = A (m x k) B (k x n), as the column-major C^T = B^T A^T.</summary>
    public void Multiply(int m, int n, int k, double* a, double* b, double* c, bool complex)
    {
        byte none = (byte)'N';
        double* one = stackalloc double[] { 1, 0 };
        double* zero = stackalloc double[] { 0, 0 };
        if (complex)
            _zgemm(&none, &none, &n, &m, &k, one, b, &n, a, &k, zero, c, &n);
        else
            _dgemm(&none, &none, &n, &m, &k, one, b, &n, a, &k, zero, c, &n);
    }
}
