using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>
/// The grading without its U(1) factors. The dominant vector may carry any density of such a charge, which a uniform state
/// with finitely many charges on its bond cannot follow; the ungraded state finds the density by itself. (Modulo 2 was tried: at half filling the state alternates along the row, and
/// keeping both translates takes twice the states for the same value.)
/// </summary>
internal static class FiniteGrading
{
    /// <summary>The same tensor, graded by the finite factors alone. States are sorted anew by charge, keeping their order within one.</summary>
    public static Tensor<T> Of<T>(Tensor<T> tensor)
        where T : unmanaged, INumberBase<T>
    {
        AbelianGroup old = tensor.Legs[0].Group;
        int[] kept = [.. Enumerable.Range(0, old.Orders.Length).Where(i => old.Orders[i] != 0)];
        if (kept.Length == old.Orders.Length)
            return tensor.Clone();
        var group = new AbelianGroup([.. kept.Select(i => old.Orders[i])]);
        int[][] positions = [.. tensor.Legs.Select(leg => Positions(leg, kept))];
        return Tensor<T>.FromFunction(
            tensor.Legs.Select(leg => Regraded(group, leg, kept)),
            at =>
            {
                ReadOnlySpan<int> p = at.Span;
                return tensor.At(positions[0][p[0]], positions[1][p[1]], positions[2][p[2]], positions[3][p[3]]);
            },
            Pick(tensor.Flux, kept));
    }

    private static Leg Regraded(AbelianGroup group, Leg leg, int[] kept)
        => new(group, leg.Arrow, leg.Sectors.GroupBy(s => Pick(s.Charge, kept)).Select(static g => new Sector(g.Key, g.Sum(static s => s.Dimension))));

    /// <summary>For each position on the new leg the one on the old leg.</summary>
    private static int[] Positions(Leg leg, int[] kept)
        => [.. Enumerable.Range(0, leg.Dimension).OrderBy(i => Pick(leg.Sectors[leg.Locate(i).Sector].Charge, kept))];

    private static Charge Pick(Charge charge, int[] kept)
    {
        int At(int i) => i < kept.Length ? charge[kept[i]] : 0;
        return new Charge(At(0), At(1), At(2), At(3));
    }
}
