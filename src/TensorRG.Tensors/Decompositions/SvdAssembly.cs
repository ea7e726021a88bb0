using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Builds the tensors of a truncated decomposition from the factors of each sector.</summary>
internal static class SvdAssembly
{
    /// <summary>Keeps the first counts[q] triplets of each sector q (total charge of the rows).</summary>
    public static TruncatedSvd<T> Build<T>(
        FusedSpace rows, FusedSpace columns, IReadOnlyDictionary<Charge, Factors<T>> factors, IReadOnlyDictionary<Charge, int> counts, Truncation truncation)
        where T : unmanaged, INumberBase<T>
    {
        AbelianGroup group = rows.Group;
        var bond = new Leg(group, Arrow.Out, counts.OrderBy(static p => p.Key).Select(static p => new Sector(p.Key, p.Value)));
        var bondOut = new FusedSpace(group, [bond]);
        var bondIn = new FusedSpace(group, [bond.Dual]);
        using BlockMatrix<T> left = BlockMatrix<T>.Allocate(rows, bondOut, Charge.Zero);
        using BlockMatrix<T> right = BlockMatrix<T>.Allocate(bondIn, columns, Charge.Zero);
        foreach (Sector sector in bond.Sectors)
        {
            Factors<T> f = factors[sector.Charge];
            CopyColumns(f.U, left[sector.Charge]);
            CopyAdjoint(f.V, right[sector.Charge]);
        }

        ImmutableArray<double[]> values = [.. bond.Sectors.Select(s => factors[s.Charge].S[..s.Dimension])];
        return new TruncatedSvd<T>(left.ToTensor(), new BondWeights(bond, values), right.ToTensor(), truncation);
    }

    public static void CopyColumns<T>(MatrixView<T> source, MatrixView<T> target)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < target.Rows; i++)
        {
            for (int j = 0; j < target.Columns; j++)
                target[i, j] = source[i, j];
        }
    }

    private static void CopyAdjoint<T>(MatrixView<T> source, MatrixView<T> target)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < target.Rows; i++)
        {
            for (int j = 0; j < target.Columns; j++)
                target[i, j] = Scalar.Conjugate(source[j, i]);
        }
    }
}
