using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>Temporary plain version.</summary>
public static unsafe class StridedCopy
{
    /// <summary>Copies a box between strided layouts.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="dims">Extents.</param>
    /// <param name="source">Source.</param>
    /// <param name="sourceStrides">Source strides.</param>
    /// <param name="target">Target.</param>
    /// <param name="targetStrides">Target strides.</param>
    /// <param name="conjugate">Conjugate on the way.</param>
    public static void Run<T>(ReadOnlySpan<int> dims, T* source, ReadOnlySpan<nint> sourceStrides, T* target, ReadOnlySpan<nint> targetStrides, bool conjugate)
        where T : unmanaged, INumberBase<T>
    {
        if (dims.Length == 0)
        {
            *target = conjugate ? Scalar.Conjugate(*source) : *source;
            return;
        }

        for (int i = 0; i < dims[0]; i++)
            Run(dims[1..], source + (i * sourceStrides[0]), sourceStrides[1..], target + (i * targetStrides[0]), targetStrides[1..], conjugate);
    }
}
