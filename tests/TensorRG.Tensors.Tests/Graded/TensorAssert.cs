using System.Globalization;
using System.Numerics;
using System.Runtime.InteropServices;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Tensors.Tests.Graded;

/// <summary>Comparisons that fail on NaN and say by how much.</summary>
internal static class TensorAssert
{
    public static void Small(double error, double bound, string what)
        => Assert.True(error <= bound, string.Create(CultureInfo.InvariantCulture, $"{what}: {error:E2} > {bound:E2}"));

    public static void Near(double expected, double actual, double scale, double bound, string what)
        => Small(expected == actual ? 0 : Math.Abs(actual - expected) / scale, bound, string.Create(CultureInfo.InvariantCulture, $"{what}: expected {expected:R}, got {actual:R}"));

    /// <summary>Every element, forbidden ones included, to a bound relative to a scale.</summary>
    public static void Same<T>(NaiveTensor<T> expected, Tensor<T> actual, double scale, double bound = 1e-14)
        where T : unmanaged, INumberBase<T>
        => Small(expected.Distance(NaiveTensor<T>.Of(actual)) / Math.Max(scale, double.Epsilon), bound, "largest difference of an element");

    public static void SameBits<T>(Tensor<T> expected, Tensor<T> actual)
        where T : unmanaged, INumberBase<T>
    {
        Assert.Equal(expected.Legs.ToArray(), actual.Legs.ToArray());
        Assert.Equal(expected.Flux, actual.Flux);
        Assert.True(MemoryMarshal.AsBytes(expected.Elements).SequenceEqual(MemoryMarshal.AsBytes(actual.Elements)), "the bits of two tensors differ");
    }

    public static void SameBits(BondWeights expected, BondWeights actual)
    {
        Assert.Equal(expected.Leg, actual.Leg);
        Assert.Equal(expected.Values.SelectMany(static v => v).Select(BitConverter.DoubleToInt64Bits), actual.Values.SelectMany(static v => v).Select(BitConverter.DoubleToInt64Bits));
    }

    /// <summary>The columns of U[rows, bond] are orthonormal.</summary>
    public static void Isometry<T>(TensorAlgebra<T> algebra, Tensor<T> u, double bound = 1e-13)
        where T : unmanaged, INumberBase<T>
    {
        int[] rows = [.. Enumerable.Range(0, u.Rank - 1)];
        using Tensor<T> conjugate = u.Conjugate();
        using Tensor<T> gram = algebra.Contract(conjugate, rows, u, rows);
        int n = u.Legs[^1].Dimension;
        NaiveTensor<T> unit = NaiveTensor<T>.From([n, n], static p => p[0] == p[1] ? T.One : T.Zero);
        Same(unit, gram, 1, bound);
    }
}
