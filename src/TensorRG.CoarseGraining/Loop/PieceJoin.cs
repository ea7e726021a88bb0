using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Loop;

/// <summary>
/// Joins the pieces that face a plaquette of the other colour. Turned clockwise by 45 degrees its corners north-west, north-east, south-east, south-west
/// become the legs u, r, d, l of a new tensor.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
internal sealed class PieceJoin<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The new A, between two plaquettes side by side: joined through outer legs from left to right, through old ring bonds from top to bottom.</summary>
    public Tensor<T> SideBySide(Tensor<T>[] pieces)
    {
        using Tensor<T> upper = algebra.Contract(pieces[3], [1], pieces[0], [1]);
        using Tensor<T> lower = algebra.Contract(pieces[4], [1], pieces[7], [1]);
        using Tensor<T> joined = algebra.Contract(upper, [1, 2], lower, [0, 3]);
        return Directed(joined);
    }

    /// <summary>The new B, between two plaquettes one above the other.</summary>
    public Tensor<T> Stacked(Tensor<T>[] pieces)
    {
        using Tensor<T> upper = algebra.Contract(pieces[6], [0], pieces[5], [2]);
        using Tensor<T> lower = algebra.Contract(pieces[1], [2], pieces[2], [0]);
        using Tensor<T> joined = algebra.Contract(upper, [0, 3], lower, [1, 2]);
        return Directed(joined);
    }

    /// <summary>[u, r, l, d] with any arrows as [u, l, d, r] with up and left ingoing.</summary>
    private static Tensor<T> Directed(Tensor<T> joined)
    {
        Tensor<T> tensor = joined.Permute(0, 2, 3, 1);
        for (int axis = 0; axis < 4; axis++)
        {
            if (tensor.Legs[axis].Arrow == (axis < 2 ? Arrow.In : Arrow.Out))
                continue;
            using Tensor<T> before = tensor;
            tensor = before.ReverseArrow(axis);
        }

        return tensor;
    }
}
