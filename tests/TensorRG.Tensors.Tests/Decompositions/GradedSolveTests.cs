using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;
using TensorRG.Tensors.Tests.Graded;

namespace TensorRG.Tensors.Tests.Decompositions;

public sealed class GradedSolveTests
{
    private static readonly Backend Managed = Backends.Create(Backends.Default, 1);

    [Fact]
    public void The_solution_gives_the_right_hand_side_back()
    {
        RandomCase.Check(Check<double>);
        RandomCase.Check(Check<Complex>);
    }

    [Fact]
    public void What_makes_no_system_is_refused()
    {
        Leg leg = GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 2, 1), other = GradedMatrices.Graded(AbelianGroup.Cyclic(2), Arrow.In, 1, 1);
        using Tensor<double> matrix = Tensor<double>.Zeros([leg, leg.Dual]), right = Tensor<double>.Zeros([leg, other.Dual]), wrong = Tensor<double>.Zeros([other, leg.Dual]);
        Assert.Throws<ArgumentException>(() => GradedSolve.Positive(matrix, 1, wrong));
        Assert.Throws<ArgumentException>(() => GradedSolve.Positive(right, 1, right));
        Assert.Throws<ArgumentException>(() => GradedSolve.Positive(matrix, 0, right));
        Assert.Throws<ArgumentException>(() => GradedSolve.Positive(matrix, double.NaN, right));
    }

    /// <summary>(H + shift) X = B for a Gram matrix H, which may be singular.</summary>
    private static void Check<T>(RandomCase random)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Managed);
        int half = 1 + random.Next(2);
        Leg[] rows = random.Legs(half, mayBeEmpty: false);
        using Tensor<T> m = random.Tensor<T>([.. rows, random.Leg(mayBeEmpty: false)]), conjugate = m.Conjugate();
        using Tensor<T> right = random.Tensor<T>([.. rows, random.Leg(mayBeEmpty: false)]);
        using Tensor<T> gram = algebra.Contract(m, [half], conjugate, [half]);
        double norm = Math.Max(TensorAlgebra<T>.Norm(gram), 1), shift = 1e-3 * norm;
        using Tensor<T> solution = GradedSolve.Positive(gram, shift, right);
        int[] columns = [.. Enumerable.Range(half, half)], first = [.. Enumerable.Range(0, half)];
        using Tensor<T> product = algebra.Contract(gram, columns, solution, first);
        using Tensor<T> shifted = TensorAlgebra<T>.Add(product, solution, Scalar.FromReal<T>(shift));
        TensorAssert.Same(NaiveTensor<T>.Of(right), shifted, Math.Max(TensorAlgebra<T>.Norm(right), 1e-300), 1e-12);
    }
}
