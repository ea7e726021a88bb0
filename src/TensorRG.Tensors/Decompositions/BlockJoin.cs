using System.Numerics;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Joins two blocks of vectors.</summary>
internal static class BlockJoin
{
    /// <summary>The vectors of the first block followed, sector by sector, by those of the second. The last leg counts vectors.</summary>
    public static Tensor<T> Concatenate<T>(Tensor<T> a, Tensor<T> b)
        where T : unmanaged, INumberBase<T>
    {
        int last = a.Rank - 1;
        Leg left = a.Legs[last], right = b.Legs[last];
        IEnumerable<Sector> sectors = left.Sectors.Concat(right.Sectors)
            .GroupBy(static s => s.Charge)
            .Select(static g => new Sector(g.Key, g.Sum(static s => s.Dimension)));
        var joined = new Leg(left.Group, left.Arrow, sectors);
        Tensor<T> result = Tensor<T>.Zeros([.. a.Legs[..last], joined]);
        Put(a, result, last, static _ => 0);
        Put(b, result, last, charge => left.IndexOf(charge) is int i and >= 0 ? left.Sectors[i].Dimension : 0);
        return result;
    }

    private static void Put<T>(Tensor<T> part, Tensor<T> whole, int axis, Func<Charge, int> start)
        where T : unmanaged, INumberBase<T>
    {
        Leg leg = part.Legs[axis];
        for (int sector = 0; sector < leg.Sectors.Length; sector++)
        {
            Charge charge = leg.Sectors[sector].Charge;
            using Tensor<T> slice = part.Slice(axis, sector, 0, leg.Sectors[sector].Dimension);
            whole.Assign(axis, whole.Legs[axis].IndexOf(charge), start(charge), slice);
        }
    }
}
