using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>A small random state to begin from.</summary>
internal static class StartingState
{
    /// <summary>
    /// A state whose bond has one state for every charge that a vertical leg can bring to it, two where there is no charge. Elements are mostly
    /// positive, so that it overlaps with the dominant vector of positive weights; they differ, so that no symmetry holds it back.
    /// </summary>
    public static UniformState<T> Create<T>(TensorAlgebra<T> algebra, Leg vertical, long seed)
        where T : unmanaged, INumberBase<T>
    {
        Leg bond = Bond(vertical);
        var random = new RandomSequence(seed, 0);
        Tensor<T> center = Tensor<T>.Zeros([bond, vertical, bond.Dual]);
        foreach (ref T element in center.Elements)
            element = Scalar.FromReal<T>(1 + (0.5 * random.NextUnit()));
        VectorSpace.Normalise(center);
        Tensor<T> matrix = Tensor<T>.FromFunction([bond, bond.Dual], static at => at.Span[0] == at.Span[1] ? T.One : T.Zero);
        VectorSpace.Normalise(matrix);
        return new UniformState<T>(
            UnitaryFactor.Of(algebra, center, [0, 1], [2]), UnitaryFactor.Of(algebra, center, [0], [1, 2]), center, matrix);
    }

    private static Leg Bond(Leg vertical)
    {
        AbelianGroup group = vertical.Group;
        if (vertical.Sectors.Length == 1 && vertical.Sectors[0].Charge == Charge.Zero)
            return new Leg(group, Arrow.In, [new Sector(Charge.Zero, Math.Min(2, vertical.Dimension))]);
        IEnumerable<Charge> charges = vertical.Sectors.SelectMany(s => new[] { s.Charge, group.Negate(s.Charge) }).Append(Charge.Zero);
        return new Leg(group, Arrow.In, charges.Distinct().Select(static q => new Sector(q, 1)));
    }
}
