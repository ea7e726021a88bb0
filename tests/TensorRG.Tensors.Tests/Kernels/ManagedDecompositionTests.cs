using System.Numerics;
using TensorRG.Tensors.Kernels;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>What the managed decompositions promise beyond the contract: reproducible bits, large sizes, small values.</summary>
public sealed unsafe class ManagedDecompositionTests
{
    private const double Eps = 2.220446049250313e-16;

    /// <summary>Sizes on both sides of every threshold for threads and strips.</summary>
    [Theory]
    [InlineData(1, "managed/avx2", "managed/2")]
    [InlineData(17, "managed/avx2", "managed/portable")]
    [InlineData(50, "managed/avx512", "managed/portable")]
    [InlineData(95, "managed/avx2", "managed/2")]
    [InlineData(131, "managed/portable", "managed/2")]
    [InlineData(300, "managed/avx2", "managed/2")]
    [InlineData(530, "managed/avx2", "managed/2")]
    public void Bits_do_not_depend_on_threads_or_path(int n, string first, string second)
    {
        Assert.Equal(Everything<double>(first, n), Everything<double>(second, n));
        if (n < 300)
            Assert.Equal(Everything<Complex>(first, n), Everything<Complex>(second, n));
    }

    /// <summary>
    /// Math.NET as the outside oracle, and the spectrum the matrix was made from. Math.NET itself was seen 50 eps off the
    /// latter, hence the wider bound on the former.
    /// </summary>
    [Theory]
    [InlineData("k^-4")]
    [InlineData("exp(-k/8)")]
    [InlineData("1/k")]
    [InlineData("random")]
    public void Values_agree_with_Math_NET(string kind)
    {
        const int n = 150;
        StressMatrix<double> matrix = Spectrum(kind, n);
        double[] ours = SingularValues("managed/2", matrix), theirs = SingularValues("mathnet", matrix);
        StressMatrix<double> hermitian = StressMatrix<double>.FromSpectrum(kind, n, n, Shape(kind), hermitian: true);
        double[] eigen = Eigenvalues("managed/2", hermitian), expected = Eigenvalues("mathnet", hermitian);
        double[] exact = [.. Enumerable.Range(0, n).Select(Shape(kind)).OrderDescending()];
        for (int k = 0; k < n; k++)
        {
            Assert.True(Math.Abs(ours[k] - theirs[k]) <= 200 * Eps * theirs[0], $"singular value {k}: {ours[k]:R}, {theirs[k]:R}");
            Assert.True(Math.Abs(eigen[k] - expected[k]) <= 200 * Eps * expected[0], $"eigenvalue {k}: {eigen[k]:R}, {expected[k]:R}");
            Assert.True(Math.Abs(ours[k] - exact[k]) <= 20 * Eps * exact[0], $"singular value {k}: {ours[k]:R}, {exact[k]:R}");
            Assert.True(Math.Abs(eigen[k] - exact[k]) <= 20 * Eps * exact[0], $"eigenvalue {k}: {eigen[k]:R}, {exact[k]:R}");
        }
    }

    [Fact]
    public void Large_matrices_keep_their_identities()
    {
        const int n = 512;
        StressMatrix<double> matrix = Spectrum("exp(-k/8)", n);
        IKernels<double> kernels = KernelContractTests.Open("managed/2").For<double>();
        double[] u = new double[n * n], v = new double[n * n], s = new double[n], right = new double[n * n];
        fixed (double* pa = matrix.Elements, pu = u, pv = v)
            kernels.SingularValues(new MatrixView<double>(pa, n, n), new MatrixView<double>(pu, n, n), s, new MatrixView<double>(pv, n, n));
        for (int i = 0; i < n * n; i++)
            right[(i % n * n) + (i / n)] = s[i % n] * v[i];

        // A random walk over n and a constant of ten, as for small sizes.
        double bound = 10 * Eps * Math.Sqrt(n);
        Assert.True(Residuals.Orthogonality(u, n, n) <= bound);
        Assert.True(Residuals.Orthogonality(v, n, n) <= bound);
        Assert.True(Residuals.Product(matrix.Elements, u, right, n, n, n) <= bound);
        for (int k = 0; k < n; k++)
            Assert.True(Math.Abs(s[k] - Math.Exp(-k / 8.0)) <= bound);
    }

    [Fact]
    public void A_large_eigenproblem_keeps_its_identities()
    {
        const int n = 512;
        StressMatrix<double> matrix = StressMatrix<double>.FromSpectrum("1/k", n, n, static k => 1.0 / (k + 1), hermitian: true);
        IKernels<double> kernels = KernelContractTests.Open("managed/2").For<double>();
        double[] v = new double[n * n], values = new double[n], right = new double[n * n];
        fixed (double* pa = matrix.Elements, pv = v)
            kernels.HermitianEigen(new MatrixView<double>(pa, n, n), values, new MatrixView<double>(pv, n, n));
        for (int i = 0; i < n * n; i++)
            right[(i % n * n) + (i / n)] = values[i % n] * v[i];
        double bound = 10 * Eps * Math.Sqrt(n);
        Assert.True(Residuals.Orthogonality(v, n, n) <= bound);
        Assert.True(Residuals.Product(matrix.Elements, v, right, n, n, n) <= bound);
        for (int k = 0; k < n; k++)
            Assert.True(Math.Abs(values[k] - (1.0 / (k + 1))) <= bound);
    }

    /// <summary>
    /// A well-conditioned matrix with columns scaled over sixty orders: one-sided Jacobi finds every value to the same
    /// relative accuracy (Demmel and Veselic, SIAM J. Matrix Anal. Appl. 13, 1204 (1992)).
    /// </summary>
    [Theory]
    [InlineData(6)]
    [InlineData(16)]
    public void Jacobi_is_accurate_relative_to_each_value(int n)
    {
        var random = new Random(n);
        double[] a = new double[n * n], copy = new double[n * n], u = new double[n * n], v = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                a[(i * n) + j] = ((i == j ? 4 : 0) + random.NextDouble() - 0.5) * Math.Pow(10, -60.0 * j / n);
        }

        double[] s = new double[n], expected = new double[n];
        fixed (double* pa = a, pc = copy, pu = u, pv = v)
        {
            var view = new MatrixView<double>(pa, n, n);
            new PlainKernels<double>().SingularValues(view, new MatrixView<double>(pu, n, n), expected, new MatrixView<double>(pv, n, n));
            Entry.CopyScaled(view, new MatrixView<double>(pc, n, n, 1, n), 0);
            var kernels = new ManagedKernels<double>(new Workers(1), SimdPath.Avx2);
            JacobiSvd.Solve(kernels, new MatrixView<double>(pc, n, n, 1, n), new MatrixView<double>(pu, n, n, 1, n), s, new MatrixView<double>(pv, n, n, 1, n));
        }

        for (int k = 0; k < n; k++)
            Assert.True(Math.Abs(s[k] - expected[k]) <= 1e-13 * expected[k], $"value {k}: {s[k]:R}, expected {expected[k]:R}");
    }

    private static StressMatrix<double> Spectrum(string kind, int n) => StressMatrix<double>.FromSpectrum(kind, n, n, Shape(kind));

    private static Func<int, double> Shape(string kind) => kind switch
    {
        "k^-4" => static k => Math.Pow(k + 1, -4),
        "exp(-k/8)" => static k => Math.Exp(-k / 8.0),
        "1/k" => static k => 1.0 / (k + 1),
        _ => static k => Math.Abs(Math.Sin(k + 1)),
    };

    private static double[] SingularValues(string set, StressMatrix<double> matrix)
    {
        int n = matrix.Rows;
        double[] s = new double[n], u = new double[n * n], v = new double[n * n];
        fixed (double* pa = matrix.Elements, pu = u, pv = v)
        {
            KernelContractTests.Open(set).For<double>().SingularValues(
                new MatrixView<double>(pa, n, n), new MatrixView<double>(pu, n, n), s, new MatrixView<double>(pv, n, n));
        }

        return s;
    }

    private static double[] Eigenvalues(string set, StressMatrix<double> matrix)
    {
        int n = matrix.Rows;
        double[] values = new double[n], v = new double[n * n];
        fixed (double* pa = matrix.Elements, pv = v)
            KernelContractTests.Open(set).For<double>().HermitianEigen(new MatrixView<double>(pa, n, n), values, new MatrixView<double>(pv, n, n));
        return values;
    }

    /// <summary>All outputs of the three decompositions of one random matrix, strung together.</summary>
    private static T[] Everything<T>(string set, int n)
        where T : unmanaged, INumberBase<T>
    {
        IKernels<T> kernels = KernelContractTests.Open(set).For<T>();
        var random = new Random(n);
        using var a = new StridedMatrix<T>(n, n, Layout.RowMajor, random);
        using var u = new StridedMatrix<T>(n, n, Layout.RowMajor, random);
        using var v = new StridedMatrix<T>(n, n, Layout.RowMajor, random);
        var result = new List<T>();
        var values = new double[n];
        kernels.SingularValues(a.View, u.View, values, v.View);
        Add();
        kernels.Multiply(a.View, a.View.Adjoint, u.View, false);
        kernels.HermitianEigen(u.View, values, v.View);
        Add();
        kernels.OrthogonalFactor(a.View, v.View);
        result.AddRange(a.ToArray());
        Add();
        return [.. result];

        void Add()
        {
            result.AddRange(u.ToArray());
            result.AddRange(v.ToArray());
            result.AddRange(values.Select(Scalar.FromReal<T>));
        }
    }
}
