using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

public unsafe class VectorOpsTests
{
    private const int Largest = 70;

    [Fact]
    public void Real_operations_agree_with_plain_loops_at_every_length() => CompareAll<double>();

    [Fact]
    public void Complex_operations_agree_with_plain_loops_at_every_length() => CompareAll<Complex>();

    [Theory]
    [InlineData(1e-200)]
    [InlineData(5e-324)]
    [InlineData(1e300)]
    [InlineData(1.0)]
    public void The_norm_neither_overflows_nor_underflows(double scale)
    {
        double* x = stackalloc double[21];
        for (int i = 0; i < 21; i++)
            x[i] = i == 3 ? 3 * scale : i == 20 ? -4 * scale : 0;
        double expected = 5 * scale;
        Assert.True(Math.Abs(VectorOps.Norm(x, 21) - expected) <= 1e-15 * expected);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(5)]
    [InlineData(18)]
    public void NaN_and_infinity_show_in_the_norm_and_the_maximum(int at)
    {
        double* x = stackalloc double[19];
        new Span<double>(x, 19).Fill(1);
        x[at] = double.NegativeInfinity;
        Assert.Equal(double.PositiveInfinity, VectorOps.Norm(x, 19));
        Assert.Equal(double.PositiveInfinity, VectorOps.MaxAbs(x, 19));
        x[at] = double.NaN;
        Assert.True(double.IsNaN(VectorOps.Norm(x, 19)));
        Assert.True(double.IsNaN(VectorOps.MaxAbs(x, 19)));
    }

    [Fact]
    public void A_sum_is_taken_in_sixteen_lanes_in_a_fixed_order()
    {
        var random = new Random(5);
        const int n = 75;
        double* x = stackalloc double[n];
        double* y = stackalloc double[n];
        for (int i = 0; i < n; i++)
            (x[i], y[i]) = (random.NextDouble() - 0.5, random.NextDouble() - 0.5);
        var lane = new double[16];
        for (int i = 0; i < 64; i++)
            lane[i % 16] = Math.FusedMultiplyAdd(x[i], y[i], lane[i % 16]);
        for (int i = 64; i < 72; i++)
            lane[i % 4] = Math.FusedMultiplyAdd(x[i], y[i], lane[i % 4]);
        var four = new double[4];
        for (int i = 0; i < 4; i++)
            four[i] = (lane[i] + lane[i + 4]) + (lane[i + 8] + lane[i + 12]);
        double sum = (four[0] + four[2]) + (four[1] + four[3]);
        for (int i = 72; i < n; i++)
            sum = Math.FusedMultiplyAdd(x[i], y[i], sum);
        Assert.Equal(BitConverter.DoubleToInt64Bits(sum), BitConverter.DoubleToInt64Bits(VectorOps.Dot(x, y, n)));
    }

    private static void CompareAll<T>()
        where T : unmanaged, INumberBase<T>
    {
        var random = new Random(6);
        for (int n = 0; n <= Largest; n++)
        {
            T[] x = Draw<T>(n, random), y = Draw<T>(n, random);
            T factor = StridedMatrix<T>.Element(random);
            fixed (T* px = x.Append(T.Zero).ToArray(), py = y.Append(T.Zero).ToArray())
            {
                CompareSums(px, py, x, y);
                Compare(px, x, n, factor, py, y);
            }
        }
    }

    private static void CompareSums<T>(T* px, T* py, T[] x, T[] y)
        where T : unmanaged, INumberBase<T>
    {
        int n = x.Length;
        T dot = T.Zero;
        double squares = 0, largest = 0;
        for (int i = 0; i < n; i++)
        {
            dot += Scalar.Conjugate(x[i]) * y[i];
            squares += Scalar.SquaredMagnitude(x[i]);
            Complex z = Scalar.ToComplex(x[i]);
            largest = Math.Max(largest, Math.Max(Math.Abs(z.Real), Math.Abs(z.Imaginary)));
        }

        double bound = 4e-16 * (n + 1);
        Assert.True(Scalar.Magnitude(VectorOps.Dot(px, py, n) - dot) <= bound);
        Assert.True(Math.Abs(VectorOps.SumOfSquares(px, n) - squares) <= bound);
        Assert.True(Math.Abs(VectorOps.Norm(px, n) - Math.Sqrt(squares)) <= bound);
        Assert.Equal(largest, VectorOps.MaxAbs(px, n));
    }

    private static void Compare<T>(T* px, T[] x, int n, T factor, T* py, T[] y)
        where T : unmanaged, INumberBase<T>
    {
        VectorOps.AddScaled(factor, px, py, n);
        AssertClose(py, n, i => y[i] + (factor * x[i]));
        VectorOps.ScaledCopy(factor, px, py, n);
        AssertClose(py, n, i => factor * x[i]);
        VectorOps.Scale(factor, py, n);
        AssertClose(py, n, i => factor * factor * x[i]);
        VectorOps.ScaleReal(0.25, px, n);
        AssertClose(px, n, i => Scalar.FromReal<T>(0.25) * x[i]);
    }

    private static void AssertClose<T>(T* actual, int n, Func<int, T> expected)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < n; i++)
            Assert.True(Scalar.Magnitude(actual[i] - expected(i)) <= 5e-16, $"element {i} of {n}");
        Assert.Equal(T.Zero, actual[n]);
    }

    private static T[] Draw<T>(int n, Random random)
        where T : unmanaged, INumberBase<T>
        => [.. Enumerable.Range(0, n).Select(_ => StridedMatrix<T>.Element(random))];
}
