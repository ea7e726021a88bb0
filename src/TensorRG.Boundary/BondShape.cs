using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>Changes of the states on the bond of a matrix product state.</summary>
internal static class BondShape
{
    /// <summary>Puts a tensor into a larger leg, each sector from a given position on; the other states are zero.</summary>
    public static Tensor<T> Embed<T>(Tensor<T> tensor, int axis, Leg leg, Func<Charge, int> start)
        where T : unmanaged, INumberBase<T>
    {
        Leg old = tensor.Legs[axis];
        var target = new Leg(leg.Group, old.Arrow, leg.Sectors);
        Tensor<T> result = Tensor<T>.Zeros(tensor.Legs.SetItem(axis, target), tensor.Flux);
        for (int sector = 0; sector < old.Sectors.Length; sector++)
        {
            (Charge charge, int dimension) = old.Sectors[sector];
            using Tensor<T> slice = tensor.Slice(axis, sector, 0, dimension);
            result.Assign(axis, target.IndexOf(charge), start(charge), slice);
        }

        return result;
    }

    /// <summary>The leg with the states of two others.</summary>
    public static Leg Join(Leg a, Leg b)
        => new(a.Group, a.Arrow, a.Sectors.Concat(b.Sectors).GroupBy(static s => s.Charge).Select(static g => new Sector(g.Key, g.Sum(static s => s.Dimension))));

    /// <summary>Number of states of a charge.</summary>
    public static int Count(Leg leg, Charge charge)
        => leg.IndexOf(charge) is int i and >= 0 ? leg.Sectors[i].Dimension : 0;

    /// <summary>Adds a charge to every state of the bond: the same state of the network, since both ends of a tensor shift alike.</summary>
    public static UniformState<T> Shift<T>(TensorAlgebra<T> algebra, UniformState<T> state, Charge by)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> left = Shifter<T>(state.Bond.Dual, by), right = Shifter<T>(state.Bond, by);
        return new UniformState<T>(Turn(state.AL), Turn(state.AR), Turn(state.AC), Turn(state.C));

        Tensor<T> Turn(Tensor<T> tensor) => Sandwich(algebra, left, tensor, right);
    }

    /// <summary>The state in another basis of its bond: U^H M V^H for C, and accordingly for the others.</summary>
    /// <param name="algebra">Contractions.</param>
    /// <param name="state">A state.</param>
    /// <param name="u">U[a, k]: an isometry from the new bond k.</param>
    /// <param name="v">V[k, b]: an isometry into the new bond.</param>
    public static UniformState<T> Turn<T>(TensorAlgebra<T> algebra, UniformState<T> state, Tensor<T> u, Tensor<T> v)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> uBar = u.Conjugate(), vBar = v.Conjugate();
        using Tensor<T> uAdjoint = uBar.Permute(1, 0), vAdjoint = vBar.Permute(1, 0);
        return new UniformState<T>(
            Sandwich(algebra, uBar, state.AL, u),
            Around(algebra, v, state.AR, vAdjoint),
            Around(algebra, uAdjoint, state.AC, vAdjoint),
            Around(algebra, uAdjoint, state.C, vAdjoint));
    }

    // Both matrices are contracted over their first leg.
    private static Tensor<T> Sandwich<T>(TensorAlgebra<T> algebra, Tensor<T> left, Tensor<T> middle, Tensor<T> right)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> turned = left.Permute(1, 0);
        return Around(algebra, turned, middle, right);
    }

    private static Tensor<T> Around<T>(TensorAlgebra<T> algebra, Tensor<T> left, Tensor<T> middle, Tensor<T> right)
        where T : unmanaged, INumberBase<T>
    {
        using Tensor<T> half = algebra.Contract(left, [1], middle, [0]);
        return algebra.Contract(half, [half.Rank - 1], right, [0]);
    }

    /// <summary>D[old, new] = 1 between the states of a leg's dual and those shifted by a charge, which the tensor carries as flux.</summary>
    private static Tensor<T> Shifter<T>(Leg old, Charge by)
        where T : unmanaged, INumberBase<T>
    {
        AbelianGroup group = old.Group;
        var shifted = new Leg(group, old.Dual.Arrow, old.Sectors.Select(s => new Sector(group.Add(s.Charge, by), s.Dimension)));
        return Tensor<T>.FromFunction(
            [old, shifted],
            at => old.Locate(at.Span[0]).Local == shifted.Locate(at.Span[1]).Local ? T.One : T.Zero,
            shifted.Arrow == Arrow.In ? group.Normalize(by) : group.Negate(by));
    }
}
