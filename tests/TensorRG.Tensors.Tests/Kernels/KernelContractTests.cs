using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>
/// One contract for every backend, element type and instruction path: identities with denominators, and values against
/// the plain reference. Bounds: eps per operation, a random walk over the inner dimension, and a constant of twenty, since
/// every element passes through some tens of transformations; five times that for the two slow oracles, whose Jacobi and
/// QL sweeps do not keep their vectors normalised.
/// </summary>
public sealed unsafe class KernelContractTests
{
    private const double Eps = 2.220446049250313e-16;

    private static readonly string[] Sets = ["managed/avx2", "managed/portable", "managed/avx512", "managed/2", "plain", "openblas", "mathnet", "mkl"];

    public static TheoryData<string, string> Kernels()
    {
        var data = new TheoryData<string, string>();
        foreach (string set in Sets)
        {
            data.Add(set, "double");
            data.Add(set, "complex");
        }

        return data;
    }

    [SkippableTheory]
    [MemberData(nameof(Kernels))]
    public void Products_match_the_reference(string set, string element)
        => Dispatch(set, element, new ProductCheck());

    [SkippableTheory]
    [MemberData(nameof(Kernels))]
    public void Thin_QR_keeps_its_identities_on_the_stress_list(string set, string element)
        => Dispatch(set, element, new QrCheck());

    [SkippableTheory]
    [MemberData(nameof(Kernels))]
    public void Eigendecomposition_keeps_its_identities_on_the_stress_list(string set, string element)
        => Dispatch(set, element, new EigenCheck());

    [SkippableTheory]
    [MemberData(nameof(Kernels))]
    public void Singular_values_keep_their_identities_on_the_stress_list(string set, string element)
        => Dispatch(set, element, new SvdCheck());

    [SkippableTheory]
    [MemberData(nameof(Kernels))]
    public void NaN_and_infinity_are_refused(string set, string element)
        => Dispatch(set, element, new NotFiniteCheck());

    /// <summary>The kernels of a set, or a skipped test where its library is missing.</summary>
    internal static Backend Open(string set)
    {
        string[] parts = set.Split('/');
        SimdPath? path = parts[^1] switch
        {
            "avx2" => SimdPath.Avx2,
            "portable" => SimdPath.Portable,
            "avx512" => SimdPath.Avx512,
            _ => null,
        };
        try
        {
            return Backends.Create(parts[0], parts[^1] == "2" ? 2 : 1, path);
        }
        catch (BackendUnavailableException e)
        {
            Skip.If(true, e.Message);
            throw;
        }
    }

    private static void Dispatch(string set, string element, IContractCheck check)
    {
        Backend backend = Open(set);
        var failures = new List<string>();

        // The reference is slow, and the 512-bit path is emulated where the CPU lacks it.
        int largest = set is "plain" or "managed/avx512" ? 33 : int.MaxValue;
        if (element == "double")
            check.Run(backend.For<double>(), set, largest, failures);
        else
            check.Run(backend.For<Complex>(), set, largest, failures);
        Assert.True(failures.Count == 0, $"{failures.Count} failures, the first: {string.Join("; ", failures.Take(12))}");
    }

    /// <summary>
    /// Relative bound for size n, plus what a result of magnitude 2^exponent cannot resolve where it is subnormal.
    /// </summary>
    private static double Bound(string set, int n, int exponent)
    {
        double constant = set is "plain" or "mathnet" or "mkl" ? 100 : 20;
        return (constant * Eps * Math.Sqrt(n + 3)) + Math.ScaleB(4 * Math.Sqrt(n), -1074 - exponent);
    }

    private interface IContractCheck
    {
        void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>;
    }

    private static void Expect(List<string> failures, string name, string what, double error, double bound)
    {
        if (!(error <= bound))
            failures.Add(FormattableString.Invariant($"{name}: {what} {error:E1} > {bound:E1}"));
    }

    /// <summary>
    /// Plain loops overflow on squares; Math.NET's are no better where elements span hundreds of orders, and it loses
    /// orthogonality or returns NaN on some matrices of exactly low rank (found by this very list).
    /// </summary>
    private static bool Copes<T>(string set, StressMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        if (set.StartsWith("managed", StringComparison.Ordinal) || set == "openblas")
            return true;
        bool lowRank = matrix.Name.Contains("equal columns", StringComparison.Ordinal) || matrix.Name.Contains("ones", StringComparison.Ordinal);
        return matrix.Tame && (set == "plain" || !lowRank);
    }

    private sealed class ProductCheck : IContractCheck
    {
        public void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            var random = new Random(5);
            for (int round = 0; round < 120; round++)
            {
                int m = random.Next(0, 24), k = random.Next(0, 24), n = random.Next(0, 24);
                using var a = new StridedMatrix<T>(m, k, (Layout)(round % 5), random, random.Next(2) == 0);
                using var b = new StridedMatrix<T>(k, n, (Layout)(round / 5 % 5), random, random.Next(2) == 0);
                using var c = new StridedMatrix<T>(m, n, (Layout)(round / 25 % 5), random);
                bool accumulate = random.Next(2) == 0;
                double error = Error(kernels, a, b, c, accumulate);
                c.AssertGuardsIntact();

                // k products of numbers below one: k eps in the worst case.
                Expect(failures, $"{m} x {k} x {n}", "error", error, Eps * (k + 1));
            }
        }

        private static double Error<T>(IKernels<T> kernels, StridedMatrix<T> a, StridedMatrix<T> b, StridedMatrix<T> c, bool accumulate)
            where T : unmanaged, INumberBase<T>
        {
            T[] start = c.ToArray();
            kernels.Multiply(a.View, b.View, c.View, accumulate);
            double worst = 0;
            for (int i = 0; i < c.View.Rows; i++)
            {
                for (int j = 0; j < c.View.Columns; j++)
                {
                    T sum = accumulate ? start[(i * c.View.Columns) + j] : T.Zero;
                    for (int k = 0; k < a.View.Columns; k++)
                        sum += a.View.Read(i, k) * b.View.Read(k, j);
                    worst = Residuals.Larger(worst, Scalar.Magnitude(sum - c.View[i, j]));
                }
            }

            return worst;
        }
    }

    private sealed class QrCheck : IContractCheck
    {
        public void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int index = 0;
            foreach (StressMatrix<T> matrix in StressMatrix<T>.All(largest))
            {
                if (matrix.Rows >= matrix.Columns && Copes(set, matrix))
                    Check(kernels, set, matrix, (Layout)(index++ % 5), failures);
            }
        }

        private static void Check<T>(IKernels<T> kernels, string set, StressMatrix<T> matrix, Layout layout, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int m = matrix.Rows, n = matrix.Columns;
            using StridedMatrix<T> a = matrix.Place(layout);
            using var r = new StridedMatrix<T>(n, n, layout, new Random(3));
            kernels.OrthogonalFactor(a.View, r.View);
            a.AssertGuardsIntact();
            r.AssertGuardsIntact();
            T[] q = a.ToArray(), triangle = r.ToArray();

            // Where all elements are equal, the roundings of long sums add up instead of averaging out.
            Expect(failures, matrix.Name, "orthogonality", Residuals.Orthogonality(q, m, n), Math.Max(1e-14, 4 * Eps * n));
            for (int j = 0; j < n; j++)
            {
                double residual = ColumnResidual(matrix, q, triangle, j, out int exponent);
                Expect(failures, matrix.Name, $"column {j}", residual, Bound(set, n, exponent));
                T diagonal = triangle[(j * n) + j];
                bool good = Scalar.RealPart(diagonal) >= 0 && Scalar.ToComplex(diagonal).Imaginary == 0;
                for (int i = j + 1; i < n; i++)
                    good &= triangle[(i * n) + j] == T.Zero;
                Expect(failures, matrix.Name, $"shape of R, column {j}", good ? 0 : 1, 0);
            }
        }

        /// <summary>Columns may differ by hundreds of orders of magnitude: each is compared with itself.</summary>
        private static double ColumnResidual<T>(StressMatrix<T> matrix, T[] q, T[] r, int j, out int exponent)
            where T : unmanaged, INumberBase<T>
        {
            int m = matrix.Rows, n = matrix.Columns;
            var column = new T[m];
            var factor = new T[n];
            for (int i = 0; i < m; i++)
                column[i] = matrix.Elements[(i * n) + j];
            for (int i = 0; i < n; i++)
                factor[i] = r[(i * n) + j];
            exponent = Residuals.Normalise(column);
            Residuals.Scale(factor, -exponent);
            return Residuals.Product(column, q, factor, m, n, 1);
        }
    }

    private sealed class EigenCheck : IContractCheck
    {
        public void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int index = 0;
            foreach (StressMatrix<T> matrix in StressMatrix<T>.AllHermitian(largest))
            {
                if (Copes(set, matrix))
                    Check(kernels, set, matrix, (Layout)(index++ % 5), failures);
            }
        }

        private static void Check<T>(IKernels<T> kernels, string set, StressMatrix<T> matrix, Layout layout, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int n = matrix.Rows;
            using StridedMatrix<T> a = matrix.Place(layout, conjugated: layout == Layout.Scattered);
            using var v = new StridedMatrix<T>(n, n, layout, new Random(3));
            var values = new double[n];
            T[] before = a.ToArray();
            kernels.HermitianEigen(a.View, values, v.View);
            Expect(failures, matrix.Name, "input changed", before.AsSpan().SequenceEqual(a.ToArray()) ? 0 : 1, 0);
            v.AssertGuardsIntact();
            T[] vectors = v.ToArray(), scaled = [.. matrix.Elements];
            int exponent = Residuals.Normalise(scaled);
            Residuals.Scale(values, -exponent);
            double bound = Bound(set, n, exponent);
            Expect(failures, matrix.Name, "orthogonality", Residuals.Orthogonality(vectors, n, n), bound);
            Expect(failures, matrix.Name, "residual", Residual(scaled, values, vectors, n), bound);
            Expect(failures, matrix.Name, "order", IsDescending(values) ? 0 : 1, 0);
            if (matrix.Tame && n <= 33)
                Expect(failures, matrix.Name, "values", DistanceToPlain(scaled, values, n), bound);
        }

        /// <summary>||A - V diag(values) V^H||_F / ||A||_F.</summary>
        private static double Residual<T>(T[] a, double[] values, T[] v, int n)
            where T : unmanaged, INumberBase<T>
        {
            var right = new T[n * n];
            for (int k = 0; k < n; k++)
            {
                for (int j = 0; j < n; j++)
                    right[(k * n) + j] = Scalar.FromReal<T>(values[k]) * Scalar.Conjugate(v[(j * n) + k]);
            }

            return Residuals.Product(a, v, right, n, n, n);
        }

        private static double DistanceToPlain<T>(T[] a, double[] values, int n)
            where T : unmanaged, INumberBase<T>
        {
            var expected = new double[n];
            var work = new T[n * n];
            fixed (T* pa = a, pv = work)
                new PlainKernels<T>().HermitianEigen(new MatrixView<T>(pa, n, n), expected, new MatrixView<T>(pv, n, n));
            return Distance(values, expected);
        }
    }

    private sealed class SvdCheck : IContractCheck
    {
        public void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int index = 0;
            foreach (StressMatrix<T> matrix in StressMatrix<T>.All(largest))
            {
                if (Copes(set, matrix))
                    Check(kernels, set, matrix, (Layout)(index++ % 5), failures);
            }
        }

        private static void Check<T>(IKernels<T> kernels, string set, StressMatrix<T> matrix, Layout layout, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            int m = matrix.Rows, n = matrix.Columns, k = Math.Min(m, n);
            using StridedMatrix<T> a = matrix.Place(layout, conjugated: layout == Layout.PaddedRows);
            using var u = new StridedMatrix<T>(m, k, layout, new Random(3));
            using var v = new StridedMatrix<T>(n, k, layout, new Random(4));
            var s = new double[k];
            T[] before = a.ToArray();
            kernels.SingularValues(a.View, u.View, s, v.View);
            Expect(failures, matrix.Name, "input changed", before.AsSpan().SequenceEqual(a.ToArray()) ? 0 : 1, 0);
            u.AssertGuardsIntact();
            v.AssertGuardsIntact();
            T[] left = u.ToArray(), right = v.ToArray(), scaled = [.. matrix.Elements];
            int exponent = Residuals.Normalise(scaled);
            Residuals.Scale(s, -exponent);
            
            // The longest sums run over the longer side; on equal elements their roundings add up instead of averaging out.
            double bound = Bound(set, Math.Max(m, n), exponent);
            Expect(failures, matrix.Name, "orthogonality of U", Residuals.Orthogonality(left, m, k), bound);
            Expect(failures, matrix.Name, "orthogonality of V", Residuals.Orthogonality(right, n, k), bound);
            Expect(failures, matrix.Name, "residual", Residual(scaled, left, s, right, m, n), bound);
            Expect(failures, matrix.Name, "order", IsDescending(s) && (k == 0 || s[^1] >= 0) ? 0 : 1, 0);
            if (matrix.Tame && k <= 33)
                Expect(failures, matrix.Name, "values", DistanceToPlain(scaled, s, m, n), bound);
        }

        private static double Residual<T>(T[] a, T[] u, double[] s, T[] v, int m, int n)
            where T : unmanaged, INumberBase<T>
        {
            int k = s.Length;
            var right = new T[k * n];
            for (int p = 0; p < k; p++)
            {
                for (int j = 0; j < n; j++)
                    right[(p * n) + j] = Scalar.FromReal<T>(s[p]) * Scalar.Conjugate(v[(j * k) + p]);
            }

            return Residuals.Product(a, u, right, m, k, n);
        }

        private static double DistanceToPlain<T>(T[] a, double[] s, int m, int n)
            where T : unmanaged, INumberBase<T>
        {
            int k = s.Length;
            var expected = new double[k];
            T[] u = new T[m * k], v = new T[n * k];
            fixed (T* pa = a, pu = u, pv = v)
                new PlainKernels<T>().SingularValues(new MatrixView<T>(pa, m, n), new MatrixView<T>(pu, m, k), expected, new MatrixView<T>(pv, n, k));
            return Distance(s, expected);
        }
    }

    private sealed class NotFiniteCheck : IContractCheck
    {
        public void Run<T>(IKernels<T> kernels, string set, int largest, List<string> failures)
            where T : unmanaged, INumberBase<T>
        {
            foreach (double bad in (double[])[double.NaN, double.PositiveInfinity, double.NegativeInfinity])
            {
                foreach (int n in (int[])[1, 2, 5, 20])
                    Check(kernels, bad, n);
            }
        }

        private static void Check<T>(IKernels<T> kernels, double bad, int n)
            where T : unmanaged, INumberBase<T>
        {
            using var a = new StridedMatrix<T>(n, n, Layout.RowMajor, new Random(n));
            using var u = new StridedMatrix<T>(n, n, Layout.RowMajor, new Random(n));
            using var v = new StridedMatrix<T>(n, n, Layout.RowMajor, new Random(n));
            a.View[n / 2, n / 2] = Scalar.FromReal<T>(bad);
            var values = new double[n];
            Assert.Throws<DecompositionException>(() => kernels.SingularValues(a.View, u.View, values, v.View));
            Assert.Throws<DecompositionException>(() => kernels.HermitianEigen(a.View, values, v.View));
            Assert.Throws<DecompositionException>(() => kernels.OrthogonalFactor(a.View, u.View));
        }
    }

    private static bool IsDescending(double[] values)
    {
        for (int i = 1; i < values.Length; i++)
        {
            if (!(values[i] <= values[i - 1]))
                return false;
        }

        return true;
    }

    /// <summary>Largest difference in units of the largest value.</summary>
    private static double Distance(double[] values, double[] expected)
    {
        double worst = 0, largest = 0;
        for (int i = 0; i < values.Length; i++)
        {
            worst = Residuals.Larger(worst, Math.Abs(values[i] - expected[i]));
            largest = Residuals.Larger(largest, Math.Abs(expected[i]));
        }

        return largest == 0 ? worst : worst / largest;
    }
}
