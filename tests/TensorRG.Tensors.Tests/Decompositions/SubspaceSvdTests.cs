using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;
using TensorRG.Tensors.Tests.Graded;

namespace TensorRG.Tensors.Tests.Decompositions;

/// <summary>The iterative decomposition against the full one, on spectra like those that coarse-graining meets and worse.</summary>
public sealed class SubspaceSvdTests
{
    private const int Chi = 20;
    private static readonly Backend Managed = Backends.Create(Backends.Default, 1);
    private static readonly AbelianGroup Z3 = AbelianGroup.Cyclic(3);

    [Theory]
    [InlineData("power 4", true)]
    [InlineData("exponential", true)]
    [InlineData("stretched exponential", true)]
    [InlineData("power 1", true)]
    [InlineData("nearly flat", false)]
    public void Values_and_subspaces_equal_those_of_the_full_decomposition(string spectrum, bool iterates)
    {
        Check<double>(spectrum, Balanced, null, iterates);
        Check<Complex>(spectrum, Balanced, null, iterates);
    }

    [Theory]
    [InlineData("power 4")]
    [InlineData("exponential")]
    [InlineData("stretched exponential")]
    [InlineData("power 1")]
    public void Blocks_grow_where_the_expectation_was_wrong(string spectrum)
    {
        var wrong = new Dictionary<Charge, int> { [new Charge(0)] = 0, [new Charge(1)] = 0, [new Charge(2)] = Chi };
        Check<double>(spectrum, Lopsided, wrong, null);
        Check<Complex>(spectrum, Lopsided, wrong, null);
    }

    [Fact]
    public void A_small_block_of_many_values_grows_without_a_full_decomposition()
    {
        var algebra = new TensorAlgebra<double>(Managed);
        using Tensor<double> matrix = Matrix(algebra, "exponential", Lopsided);
        var map = new MatrixMap<double>(algebra, matrix);
        var wrong = new Dictionary<Charge, int> { [new Charge(0)] = 0, [new Charge(1)] = 0, [new Charge(2)] = Chi };
        var options = new SubspaceOptions { Oversampling = 6, Margin = 4 };
        TruncatedSvd<double> svd = new SubspaceSvd<double>(algebra, options).Compute(map, new CutRule(Chi), new RandomSequence(1), wrong);
        Assert.Equal(0, map.Expansions);
        Compare(algebra, DenseSvd.Compute(algebra.Kernels, matrix, [0], [1], new CutRule(Chi)), svd);
    }

    [Fact]
    public void The_same_stream_gives_the_same_bits()
    {
        var algebra = new TensorAlgebra<Complex>(Managed);
        using Tensor<Complex> matrix = Matrix(algebra, "exponential", Balanced);
        TruncatedSvd<Complex> Run() => new SubspaceSvd<Complex>(algebra, new SubspaceOptions())
            .Compute(new MatrixMap<Complex>(algebra, matrix), new CutRule(Chi), new RandomSequence(7, 3, 1));
        TruncatedSvd<Complex> first = Run(), second = Run();
        TensorAssert.SameBits(first.U, second.U);
        TensorAssert.SameBits(first.V, second.V);
        TensorAssert.SameBits(first.Weights, second.Weights);
        Assert.Equal(first.Truncation, second.Truncation);
    }

    /// <summary>Means and extremes over fixed seeds: each estimate scatters, their mean does not lean.</summary>
    [Theory]
    [InlineData("power 4")]
    [InlineData("exponential")]
    [InlineData("stretched exponential")]
    public void The_estimate_of_the_discarded_weight_does_not_lean(string spectrum)
    {
        const int Seeds = 30;
        var algebra = new TensorAlgebra<double>(Managed);
        using Tensor<double> matrix = Matrix(algebra, spectrum, Balanced);
        double exact = DenseSvd.Compute(algebra.Kernels, matrix, [0], [1], new CutRule(Chi)).Truncation.DiscardedWeight;
        double[] ratios = [.. Enumerable.Range(0, Seeds).Select(seed => new SubspaceSvd<double>(algebra, new SubspaceOptions())
            .Compute(new MatrixMap<double>(algebra, matrix), new CutRule(Chi), new RandomSequence(seed)).Truncation.DiscardedWeight / exact)];
        Assert.InRange(ratios.Average(), 0.9, 1.1);
        Assert.InRange(ratios.Min(), 0.5, 1);
        Assert.InRange(ratios.Max(), 1, 2);
    }

    [Fact]
    public void A_zero_matrix_is_refused()
    {
        var algebra = new TensorAlgebra<double>(Managed);
        Leg leg = GradedMatrices.Graded(Z3, Arrow.In, 120, 120, 120);
        using Tensor<double> zero = Tensor<double>.Zeros([leg, leg.Dual]);
        Assert.Throws<DecompositionException>(() => new SubspaceSvd<double>(algebra, new SubspaceOptions())
            .Compute(new MatrixMap<double>(algebra, zero), new CutRule(Chi), new RandomSequence(1)));
    }

    [Fact]
    public void NaN_is_refused()
    {
        var algebra = new TensorAlgebra<double>(Managed);
        using Tensor<double> matrix = Matrix(algebra, "exponential", Balanced);
        matrix.Elements[17] = double.NaN;
        Assert.Throws<DecompositionException>(() => new SubspaceSvd<double>(algebra, new SubspaceOptions())
            .Compute(new MatrixMap<double>(algebra, matrix), new CutRule(Chi), new RandomSequence(1)));
    }

    /// <summary>Sector of the k-th largest value: in turn.</summary>
    private static int Balanced(int k) => k % 3;

    /// <summary>Sector of the k-th largest value: nearly all in the first, which has the most states.</summary>
    private static int Lopsided(int k) => k % 10 == 4 ? 1 : k % 10 == 9 ? 2 : 0;

    private static double Value(string spectrum, int k) => spectrum switch
    {
        "power 4" => Math.Pow(k, -4),
        "exponential" => Math.Exp(-k / 8.0),
        "stretched exponential" => Math.Exp(-Math.Sqrt(k)),
        "nearly flat" => 1 - (k * 1e-3),
        _ => 1.0 / k,
    };

    private static Tensor<T> Matrix<T>(TensorAlgebra<T> algebra, string spectrum, Func<int, int> sector)
        where T : unmanaged, INumberBase<T>
    {
        int[] rows = [170, 110, 100], columns = [160, 120, 100];
        double[][] values = [.. Enumerable.Range(0, 3).Select(q => Enumerable.Range(1, 900).Where(k => sector(k) == q).Select(k => Value(spectrum, k)).Take(Math.Min(rows[q], columns[q])).ToArray())];
        return GradedMatrices.WithSpectrum(algebra, new RandomCase(11), Z3, rows, columns, values);
    }

    private static void Check<T>(string spectrum, Func<int, int> sector, Dictionary<Charge, int>? expected, bool? iterates)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        using Tensor<T> matrix = Matrix(algebra, spectrum, sector);
        var map = new MatrixMap<T>(algebra, matrix);
        TruncatedSvd<T> svd = new SubspaceSvd<T>(algebra, new SubspaceOptions()).Compute(map, new CutRule(Chi), new RandomSequence(1, 2, 3), expected);
        Assert.True(map.Applications >= 3, "the iteration must have been tried");
        if (iterates is bool expectedWay)
            Assert.Equal(expectedWay, map.Expansions == 0);
        Compare(algebra, DenseSvd.Compute(algebra.Kernels, matrix, [0], [1], new CutRule(Chi)), svd);
    }

    private static void Compare<T>(TensorAlgebra<T> algebra, TruncatedSvd<T> full, TruncatedSvd<T> svd)
        where T : unmanaged, INumberBase<T>
    {
        Assert.Equal(full.Weights.Leg, svd.Weights.Leg);
        double largest = full.Weights.Largest, tolerance = new SubspaceOptions().Tolerance;
        foreach ((double expected, double actual) in GradedMatrices.Descending(full.Weights).Zip(GradedMatrices.Descending(svd.Weights)))
            TensorAssert.Near(expected, actual, expected, tolerance + (1e-15 * largest / expected), "singular value");
        TensorAssert.Isometry(algebra, svd.U);
        TensorAssert.Isometry(algebra, GradedMatrices.RightVectors(svd));
        using Tensor<T> a = GradedMatrices.Product(algebra, full), b = GradedMatrices.Product(algebra, svd);
        using Tensor<T> difference = TensorAlgebra<T>.Add(a, b, Scalar.FromReal<T>(-1));

        // A singular value is second order in the error of its vectors: settled to tau, they are settled to sqrt(tau).
        TensorAssert.Small(TensorAlgebra<T>.Norm(difference) / largest, Math.Sqrt(tolerance), "difference of the truncated matrices");

        // Only the last values are off by as much as the tolerance allows.
        double last = GradedMatrices.Descending(full.Weights).Last();
        double bound = 1e-13 + (2 * tolerance * last * last / full.Truncation.KeptWeight);
        TensorAssert.Near(full.Truncation.KeptWeight, svd.Truncation.KeptWeight, full.Truncation.KeptWeight, bound, "kept weight");
        Assert.InRange(svd.Truncation.DiscardedWeight, full.Truncation.DiscardedWeight / 1.5, full.Truncation.DiscardedWeight * 1.5);
        Assert.False(svd.Truncation.CutsMultiplet);
    }
}
