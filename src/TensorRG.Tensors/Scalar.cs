using System.Numerics;
using System.Runtime.CompilerServices;

namespace TensorRG.Tensors;

/// <summary>
/// The few operations that tell a real from a complex element. The type tests are resolved by the JIT, so each
/// instantiation compiles to straight code.
/// </summary>
public static class Scalar
{
    /// <summary>The complex conjugate; the value itself for a real type.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any value.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T Conjugate<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) != typeof(Complex))
            return value;
        return (T)(object)Complex.Conjugate((Complex)(object)value);
    }

    /// <summary>|value|^2.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any value.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double SquaredMagnitude<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (double)(object)value * (double)(object)value;
        Complex z = ToComplex(value);
        return (z.Real * z.Real) + (z.Imaginary * z.Imaginary);
    }

    /// <summary>|value|, safe against overflow of the square.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any value.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Magnitude<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return Math.Abs((double)(object)value);
        return Complex.Abs(ToComplex(value));
    }

    /// <summary>The real part.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any value.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double RealPart<T>(T value)
        where T : unmanaged, INumberBase<T>
        => typeof(T) == typeof(double) ? (double)(object)value : ToComplex(value).Real;

    /// <summary>The element as a complex number.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any value.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Complex ToComplex<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (double)(object)value;
        return (Complex)(object)value;
    }

    /// <summary>A real number as an element.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="value">Any real number.</param>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T FromReal<T>(double value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
            return (T)(object)value;
        return (T)(object)new Complex(value, 0);
    }
}
