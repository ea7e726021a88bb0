using System.Numerics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Boundary;

/// <summary>
/// Adds states to the bond of a uniform state: the leading singular vectors, over all charges together, of the updated tensor of two
/// vertices outside the spaces that AL and AR span already (V. Zauner-Stauber et al., Phys. Rev. B 97, 045145 (2018), app. B).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
internal sealed class SubspaceExpansion<T>(TensorAlgebra<T> algebra)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Directions below this fraction of the two-vertex tensor are round-off.</summary>
    private const double Floor = 1e-14;

    /// <summary>The state with more states on its bond, or null where nothing of weight lies outside.</summary>
    /// <param name="state">A state.</param>
    /// <param name="twoVertices">AC2[a, p, p', b]: the row applied to two vertices of the state.</param>
    /// <param name="bondDimension">Most states on the bond after the expansion.</param>
    public UniformState<T>? Expand(UniformState<T> state, Tensor<T> twoVertices, int bondDimension)
    {
        int room = bondDimension - state.BondDimension;
        if (room < 1)
            return null;
        using Tensor<T> outside = Outside(state, twoVertices);
        double largest = VectorSpace.Norm(outside), floor = Floor * VectorSpace.Norm(twoVertices);
        if (!(largest > floor))
            return null;
        TruncatedSvd<T> svd = DenseSvd.Compute(algebra.Kernels, outside, [0, 1], [2, 3], new CutRule(room, RelativeFloor: floor / largest));
        using Tensor<T> u = svd.U, v = svd.V;
        return svd.Weights.Largest > floor ? Join(state, u, v) : null;
    }

    /// <summary>(1 - AL AL^H) AC2 (1 - AR^H AR).</summary>
    private Tensor<T> Outside(UniformState<T> state, Tensor<T> two)
    {
        using Tensor<T> left = state.AL.Conjugate(), right = state.AR.Conjugate();
        using Tensor<T> leftPart = algebra.Contract(left, [0, 1], two, [0, 1]);
        using Tensor<T> inLeft = algebra.Contract(state.AL, [2], leftPart, [0]);
        Tensor<T> result = TensorAlgebra<T>.Add(two, inLeft, -T.One);
        using Tensor<T> rightPart = algebra.Contract(result, [2, 3], right, [1, 2]);
        using Tensor<T> inRight = algebra.Contract(rightPart, [2], state.AR, [0]);
        VectorSpace.AddTo(result, inRight, -T.One);
        return result;
    }

    private static UniformState<T> Join(UniformState<T> state, Tensor<T> u, Tensor<T> v)
    {
        Leg bond = state.Bond, whole = BondShape.Join(bond, v.Legs[0]);
        int Old(Charge _) => 0;
        int New(Charge q) => BondShape.Count(bond, q);
        using Tensor<T> left = Both(u, New, outer: 0, inner: 2), right = Both(v, New, outer: 2, inner: 0);
        return new UniformState<T>(
            TensorAlgebra<T>.Add(Both(state.AL, Old, 0, 2), left, T.One),
            TensorAlgebra<T>.Add(Both(state.AR, Old, 0, 2), right, T.One),
            Both(state.AC, Old, 0, 2),
            Both(state.C, Old, 0, 1));

        // The states on the outer bond are old ones; those on the inner bond begin where the caller says.
        Tensor<T> Both(Tensor<T> tensor, Func<Charge, int> start, int outer, int inner)
        {
            using Tensor<T> half = BondShape.Embed(tensor, outer, whole, Old);
            return BondShape.Embed(half, inner, whole, start);
        }
    }
}
