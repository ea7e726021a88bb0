using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// A set of kernels for both element types. The one in use is handed down explicitly: there is no global state.
/// </summary>
/// <param name="name">Short name, as given to <c>--backend</c>.</param>
/// <param name="description">What runs underneath, for records: instruction path, library version, threads.</param>
/// <param name="real">Kernels for <see cref="double"/>.</param>
/// <param name="complex">Kernels for <see cref="Complex"/>.</param>
public sealed class Backend(string name, string description, IKernels<double> real, IKernels<Complex> complex)
{
    /// <summary>Short name, as given to <c>--backend</c>.</summary>
    public string Name { get; } = name;

    /// <summary>What runs underneath: instruction path, library version.</summary>
    public string Description { get; } = description;

    /// <summary>The kernels for one element type.</summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <exception cref="NotSupportedException">Another element type.</exception>
    public IKernels<T> For<T>()
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (IKernels<T>)real;
        if (typeof(T) == typeof(Complex))
            return (IKernels<T>)complex;
        throw new NotSupportedException($"No kernels for elements of type {typeof(T).Name}; use double or Complex.");
    }
}
