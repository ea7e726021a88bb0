using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;
using TensorRG.Tensors.Tests.Graded;

namespace TensorRG.Tensors.Tests.Decompositions;

public sealed class QrAndEigenTests
{
    private static readonly Backend Managed = Backends.Create(Backends.Default, 1);

    [Fact]
    public void QR_keeps_its_identities()
    {
        RandomCase.Check(CheckQr<double>);
        RandomCase.Check(CheckQr<Complex>);
    }

    [Fact]
    public void Eigenpairs_of_a_gram_matrix_are_squared_singular_pairs()
    {
        RandomCase.Check(CheckEigen<double>);
        RandomCase.Check(CheckEigen<Complex>);
    }

    [Fact]
    public void General_eigenvalues_are_those_of_the_dense_matrix()
    {
        RandomCase.Check(CheckGeneral<double>);
        RandomCase.Check(CheckGeneral<Complex>);
    }

    [Fact]
    public void General_eigenvalues_carry_the_charge_of_their_sector()
    {
        Leg leg = GradedMatrices.Graded(AbelianGroup.Cyclic(3), Arrow.In, 2, 1, 2);
        double[,] elements = { { 0, -3, 0, 0, 0 }, { 3, 0, 0, 0, 0 }, { 0, 0, -5, 0, 0 }, { 0, 0, 0, 2, 1 }, { 0, 0, 0, 0, 4 } };
        using Tensor<double> matrix = Tensor<double>.FromFunction([leg, leg.Dual], p => elements[p.Span[0], p.Span[1]]);
        (int, Complex)[] expected = [(1, -5), (2, 4), (0, new Complex(0, 3)), (0, new Complex(0, -3)), (2, 2)];
        IReadOnlyList<(Charge Charge, Complex Value)> values = GeneralEigen.Values(matrix);
        Assert.Equal(expected.Select(static e => e.Item1), values.Select(static v => v.Charge.First));
        foreach (((int, Complex Value) e, (Charge, Complex Value) v) in expected.Zip(values))
            TensorAssert.Small((e.Value - v.Value).Magnitude, 1e-13, "eigenvalue");
    }

    [Fact]
    public void What_has_no_eigenvalues_is_refused()
    {
        Leg leg = GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 2, 1);
        using Tensor<double> same = Tensor<double>.Zeros([leg, leg]);
        Assert.Throws<ArgumentException>(() => GeneralEigen.Values(same));
        Assert.Throws<ArgumentException>(() => GradedEigen.Compute(Managed.For<double>(), same, new CutRule(2)));
        using Tensor<double> zero = Tensor<double>.Zeros([leg, leg.Dual]);
        Assert.Throws<DecompositionException>(() => GradedEigen.Compute(Managed.For<double>(), zero, new CutRule(2)));
        using Tensor<double> nan = Tensor<double>.FromFunction([leg, leg.Dual], static _ => double.NaN);
        Assert.Throws<DecompositionException>(() => GeneralEigen.Values(nan));
        Assert.Throws<DecompositionException>(() => GradedEigen.Compute(Managed.For<double>(), nan, new CutRule(2)));
        using Tensor<double> charged = Tensor<double>.Zeros([leg, leg.Dual], new Charge(1));
        Assert.Throws<ArgumentException>(() => GradedQr.Compute(Managed.For<double>(), charged, [0], [1]));
    }

    private static void CheckQr<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        Leg[] legs = random.Legs(2 + random.Next(3), mayBeEmpty: false);
        legs[^1] = legs[0].Dual;
        int[] order = random.Permutation(legs.Length);
        int split = 1 + random.Next(legs.Length - 1);
        using Tensor<T> tensor = random.Tensor<T>(legs);
        (Tensor<T> q, Tensor<T> r) = GradedQr.Compute(algebra.Kernels, tensor, order.AsSpan(0, split), order.AsSpan(split));
        TensorAssert.Isometry(algebra, q);
        using Tensor<T> product = algebra.Contract(q, [q.Rank - 1], r, [0]);
        TensorAssert.Same(NaiveTensor<T>.Of(tensor).Permute(order), product, Math.Max(TensorAlgebra<T>.Norm(tensor), 1e-300), 1e-13);
    }

    private static void CheckEigen<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        int half = 1 + random.Next(2);
        Leg[] rows = random.Legs(half, mayBeEmpty: false);
        Leg column = random.Chance(0.5) ? rows[0].Dual : random.Leg(mayBeEmpty: false);
        using Tensor<T> m = random.Tensor<T>([.. rows, column]), conjugate = m.Conjugate();
        if (m.BlockCount == 0)
            return;
        using Tensor<T> gram = algebra.Contract(m, [half], conjugate, [half]);
        int chi = 1 + random.Next(6);
        TruncatedEigen<T> eigen = GradedEigen.Compute(algebra.Kernels, gram, new CutRule(chi));
        double[] dense = [.. GradedMatrices.DenseSingularValues(NaiveTensor<T>.Of(m), half).Select(static s => s * s)];
        double[] kept = GradedMatrices.Descending(eigen.Values);
        Assert.Equal(new CutRule(chi).Count(dense, out _), kept.Length);
        for (int i = 0; i < kept.Length; i++)
            TensorAssert.Near(dense[i], kept[i], dense[0], 1e-13, $"eigenvalue {i}");
        TensorAssert.Near(dense.Sum(), eigen.Truncation.KeptWeight + eigen.Truncation.DiscardedWeight, dense.Sum(), 1e-13, "trace");
        TensorAssert.Near(kept.Sum(), eigen.Truncation.KeptWeight, dense.Sum(), 1e-13, "kept weight");
        TensorAssert.Isometry(algebra, eigen.Vectors);
        int[] columns = [.. Enumerable.Range(half, half)], first = [.. Enumerable.Range(0, half)];
        using Tensor<T> moved = algebra.Contract(gram, columns, eigen.Vectors, first), stretched = TensorAlgebra<T>.ScaleLeg(eigen.Vectors, half, eigen.Values);
        TensorAssert.Same(NaiveTensor<T>.Of(stretched), moved, dense[0], 1e-13);
    }

    /// <summary>Power sums of the eigenvalues are traces of powers, which plain contraction gives.</summary>
    private static void CheckGeneral<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        Leg leg = random.Leg(mayBeEmpty: false);
        using Tensor<T> matrix = random.Tensor<T>([leg, leg.Dual]);
        IReadOnlyList<(Charge Charge, Complex Value)> values = GeneralEigen.Values(matrix);
        Assert.Equal(leg.Dimension, values.Count);
        double[] magnitudes = [.. values.Select(static v => v.Value.Magnitude)];
        Assert.True(magnitudes.Zip(magnitudes.Skip(1)).All(static p => p.First >= p.Second), "magnitudes descend");
        Tensor<T> power = matrix;
        double norm = Math.Max(TensorAlgebra<T>.Norm(matrix), 1), scale = norm;
        for (int k = 1; k <= leg.Dimension; k++, scale *= norm)
        {
            Complex expected = Scalar.ToComplex(TensorAlgebra<T>.Trace(power, [0], [1]).At());
            Complex sum = values.Aggregate(Complex.Zero, (s, v) => s + Complex.Pow(v.Value, k));
            TensorAssert.Small((sum - expected).Magnitude / scale, 1e-11, $"sum of eigenvalues to the power {k}");
            power = algebra.Contract(power, [1], matrix, [0]);
        }
    }
}
