using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>Eigendecomposition of Hermitian graded tensors over all sectors together.</summary>
public static class GradedEigen
{
    /// <summary>
    /// Keeps the largest eigenvalues of a Hermitian, positive semidefinite H[rows, columns] whose column legs are the
    /// duals of its row legs. Negative eigenvalues of round-off size count as zero.
    /// </summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="kernels">Dense kernels.</param>
    /// <param name="tensor">H, without flux; the first half of its legs makes the rows.</param>
    /// <param name="rule">How many eigenvalues to keep.</param>
    /// <exception cref="ArgumentException">The legs do not pair up.</exception>
    /// <exception cref="DecompositionException">NaN or infinity, no convergence, or no positive eigenvalue.</exception>
    public static TruncatedEigen<T> Compute<T>(IKernels<T> kernels, Tensor<T> tensor, CutRule rule)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(kernels);
        ArgumentNullException.ThrowIfNull(tensor);
        ArgumentNullException.ThrowIfNull(rule);
        int half = tensor.Rank / 2;
        if (tensor.Rank != 2 * half || tensor.Flux != Charge.Zero || !Enumerable.Range(0, half).All(i => tensor.Legs[i].Matches(tensor.Legs[half + i])))
            throw new ArgumentException("The second half of the legs must be the duals of the first, without flux.", nameof(tensor));
        using BlockMatrix<T> matrix = BlockMatrix<T>.From(tensor, [.. Enumerable.Range(0, half)], [.. Enumerable.Range(half, half)]);
        var factors = new Dictionary<Charge, Factors<T>>();
        try
        {
            foreach (Charge charge in matrix.Charges)
                factors.Add(charge, Diagonalise(kernels, matrix[charge]));
            return Assemble(matrix.Rows, factors, rule);
        }
        finally
        {
            foreach (Factors<T> f in factors.Values)
                f.Dispose();
        }
    }

    private static Factors<T> Diagonalise<T>(IKernels<T> kernels, MatrixView<T> block)
        where T : unmanaged, INumberBase<T>
    {
        var f = new Factors<T>(block.Rows, 0, block.Rows);
        kernels.HermitianEigen(block, f.S, f.U);
        for (int i = 0; i < f.S.Length; i++)
            f.S[i] = Math.Max(f.S[i], 0);
        PhaseConvention.Apply(f.U, f.V);
        return f;
    }

    private static TruncatedEigen<T> Assemble<T>(FusedSpace rows, Dictionary<Charge, Factors<T>> factors, CutRule rule)
        where T : unmanaged, INumberBase<T>
    {
        Dictionary<Charge, double[]> values = factors.ToDictionary(static p => p.Key, static p => p.Value.S);
        Dictionary<Charge, int> counts = SectorCut.Counts(values, rule, out bool cuts);
        if (counts.Values.Sum() == 0)
            throw new DecompositionException("The matrix has no positive eigenvalue to keep.");
        double kept = values.Sum(p => p.Value.AsSpan(0, counts[p.Key]).ToArray().Reverse().Sum());
        double lost = values.Sum(p => p.Value.AsSpan(counts[p.Key]).ToArray().Reverse().Sum());
        var bond = new Leg(rows.Group, Arrow.Out, counts.Select(static p => new Sector(p.Key, p.Value)));
        using BlockMatrix<T> vectors = BlockMatrix<T>.Allocate(rows, new FusedSpace(rows.Group, [bond]), Charge.Zero);
        foreach (Sector sector in bond.Sectors)
            SvdAssembly.CopyColumns(factors[sector.Charge].U, vectors[sector.Charge]);
        ImmutableArray<double[]> keptValues = [.. bond.Sectors.Select(s => values[s.Charge][..s.Dimension])];
        return new TruncatedEigen<T>(vectors.ToTensor(), new BondWeights(bond, keptValues), new Truncation(kept, lost, cuts));
    }
}
