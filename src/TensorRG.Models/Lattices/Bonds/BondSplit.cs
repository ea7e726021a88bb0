using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>
/// Finds the basis of a bond, charge by charge. With raw states scaled by g, F the basis of characters and U an orthonormal basis of what
/// the weights send into the bond, Out = g^-1 F U s^(1/2) and In = s^(-1/2) U^H F^H g. What impurities send beyond it is added with s = 1:
/// there the weights have no element on the ingoing leg.
/// </summary>
internal sealed class BondSplit
{
    private const double DroppedBond = 1e-15;
    private const double DroppedWeight = 1e-14;
    private const double Dependent = 1e-13;
    private const double DroppedImpurity = 1e-13;
    private const double OwnDirection = 0.1;

    private readonly double[] scale;
    private readonly bool isReal;
    private readonly bool balances;
    private readonly List<(int[] Charge, Complex[][] Vectors)> sectors;

    /// <summary>A bond with a basis of its raw states.</summary>
    /// <param name="basis">The vectors of F with their charges, ordered by charge.</param>
    /// <param name="scale">g for each raw state; zero or not finite for states that never occur on both ends.</param>
    /// <param name="isReal">True if products of rows are real in this basis.</param>
    /// <param name="balances">True to share the singular values between both ends (bond weights), false to leave the basis F where nothing can be dropped.</param>
    public BondSplit((int[] Charge, Complex[] Vector)[] basis, double[] scale, bool isReal, bool balances)
    {
        this.scale = scale;
        this.isReal = isReal;
        this.balances = balances;
        sectors = [];
        foreach ((int[] charge, Complex[] vector) in basis)
        {
            if (!vector.Where((x, i) => x != 0 && double.IsFinite(scale[i]) && scale[i] > 0).Any())
                continue;
            if (sectors.Count == 0 || !sectors[^1].Charge.AsSpan().SequenceEqual(charge))
                sectors.Add((charge, []));
            sectors[^1] = (charge, [.. sectors[^1].Vectors, vector]);
        }
    }

    /// <summary>The basis of the bond.</summary>
    /// <param name="weights">Columns that the weights send into the bond.</param>
    /// <param name="impurities">Columns that impurities send; made only if needed.</param>
    public LegBasis Find(Complex[,] weights, Func<IEnumerable<Complex[,]>> impurities)
    {
        if (!balances && (IsDiagonal(weights) || sectors.TrueForAll(s => IsIndependent(Rows(s.Vectors, weights)))))
            return Assemble([.. sectors.SelectMany(static (s, k) => s.Vectors.Select((_, j) => (k, Unit(j, s.Vectors.Length), 1.0)))]);
        List<(int Sector, Complex[] Vector, double Value)> states = Reached(weights);
        if (states.Count < sectors.Sum(static s => s.Vectors.Length))
            Extend(states, [.. impurities()]);
        return Assemble(states);
    }

    private static bool IsDiagonal(Complex[,] matrix)
    {
        int rows = matrix.GetLength(0);
        for (int j = 0; j < matrix.GetLength(1); j++)
        {
            for (int i = 0; i < rows; i++)
            {
                if (i != j % rows && matrix[i, j] != 0)
                    return false;
            }
        }
        return true;
    }

    // Small rows count as much as large ones: a state of small local weight may be one that no configuration of the lattice can do without.
    private static bool IsIndependent(Complex[][] rows)
    {
        Complex[][] scaled = [.. rows.Select(static r =>
        {
            double norm = Math.Sqrt(r.Sum(static x => (x.Real * x.Real) + (x.Imaginary * x.Imaginary)));
            return norm > 0 ? r.Select(x => x / norm).ToArray() : r;
        })];
        return RowRotations.Decompose(scaled).S[^1] > Dependent;
    }

    private List<(int Sector, Complex[] Vector, double Value)> Reached(Complex[,] weights)
    {
        (Complex[,] U, double[] S)[] parts = [.. sectors.Select(s => RowRotations.Decompose(Rows(s.Vectors, weights)))];
        double largest = parts.SelectMany(static p => p.S).DefaultIfEmpty(0).Max();
        double dropped = (balances ? DroppedBond : DroppedWeight) * largest;
        List<(int Sector, Complex[] Vector, double Value)> states = [];
        for (int k = 0; k < parts.Length; k++)
        {
            (Complex[,] u, double[] s) = parts[k];
            for (int j = 0; j < s.Length && s[j] > dropped; j++)
                states.Add((k, Column(u, j), s[j] / largest));
        }
        return states;
    }

    private static Complex[] Column(Complex[,] matrix, int j) => [.. Enumerable.Range(0, matrix.GetLength(0)).Select(i => matrix[i, j])];

    private static Complex[] Unit(int j, int n)
    {
        var vector = new Complex[n];
        vector[j] = 1;
        return vector;
    }

    // F^H g M. Where products of rows are real they are those of the real and the imaginary parts side by side.
    private Complex[][] Rows(Complex[][] vectors, Complex[,] matrix)
    {
        int columns = matrix.GetLength(1);
        return [.. vectors.Select(v =>
        {
            var row = new Complex[columns];
            for (int i = 0; i < v.Length; i++)
            {
                Complex factor = Complex.Conjugate(v[i]);
                if (factor == 0 || !double.IsFinite(scale[i]))
                    continue;
                factor *= scale[i];
                for (int c = 0; c < columns; c++)
                    row[c] += factor * matrix[i, c];
            }
            return isReal ? [.. row.Select(static x => (Complex)x.Real), .. row.Select(static x => (Complex)x.Imaginary)] : row;
        })];
    }

    private void Extend(List<(int Sector, Complex[] Vector, double Value)> states, Complex[][,] impurities)
    {
        for (int k = 0; k < sectors.Count; k++)
        {
            Complex[][] known = [.. states.Where(s => s.Sector == k).Select(static s => s.Vector)];
            int size = sectors[k].Vectors.Length;
            if (known.Length == size || impurities.Length == 0)
                continue;
            Complex[][] rows = [.. Enumerable.Range(0, size).Select(static _ => Array.Empty<Complex>())];
            foreach (Complex[,] impurity in impurities)
                rows = [.. rows.Zip(Remainder(Rows(sectors[k].Vectors, impurity), known), static (a, b) => a.Concat(b).ToArray())];
            (Complex[,] u, double[] s) = RowRotations.Decompose(rows);
            foreach (Complex[] vector in Orthonormal(Enumerable.Range(0, size - known.Length).Where(j => s[j] > DroppedImpurity).Select(j => Column(u, j)), known))
                states.Add((k, vector, 1));
        }
    }

    // A direction of small s carries round-off along the known ones, and Out In would count those twice. What is left of it after they are taken
    // out is a direction of its own, or was round-off altogether.
    private static List<Complex[]> Orthonormal(IEnumerable<Complex[]> candidates, Complex[][] known)
    {
        List<Complex[]> found = [];
        foreach (Complex[] candidate in candidates)
        {
            Complex[] vector = Without(Without(candidate, [.. known, .. found]), [.. known, .. found]);
            double norm = Math.Sqrt(vector.Sum(static x => (x.Real * x.Real) + (x.Imaginary * x.Imaginary)));
            if (norm > OwnDirection)
                found.Add([.. vector.Select(x => x / norm)]);
        }
        return found;
    }

    private static Complex[] Without(Complex[] vector, Complex[][] known)
    {
        Complex[] result = [.. vector];
        foreach (Complex[] other in known)
        {
            Complex overlap = other.Zip(result, static (a, b) => Complex.Conjugate(a) * b).Aggregate(Complex.Zero, static (a, b) => a + b);
            for (int i = 0; i < result.Length; i++)
                result[i] -= overlap * other[i];
        }
        return result;
    }

    // (1 - U U^H) M, with M scaled to a largest row of norm 1.
    private static Complex[][] Remainder(Complex[][] rows, Complex[][] known)
    {
        double norm = Math.Sqrt(rows.Max(static r => r.Sum(static x => (x.Real * x.Real) + (x.Imaginary * x.Imaginary))));
        if (norm == 0)
            return rows;
        foreach (Complex[] vector in known)
        {
            for (int c = 0; c < rows[0].Length; c++)
            {
                Complex overlap = 0;
                for (int i = 0; i < rows.Length; i++)
                    overlap += Complex.Conjugate(vector[i]) * rows[i][c];
                for (int i = 0; i < rows.Length; i++)
                    rows[i][c] -= vector[i] * overlap;
            }
        }
        return [.. rows.Select(r => r.Select(x => x / norm).ToArray())];
    }

    private LegBasis Assemble(List<(int Sector, Complex[] Vector, double Value)> states)
    {
        (int Sector, Complex[] Vector, double Value)[] sorted = [.. states.OrderBy(static s => s.Sector)];
        var into = new Complex[sorted.Length, scale.Length];
        var outOf = new Complex[scale.Length, sorted.Length];
        for (int k = 0; k < sorted.Length; k++)
        {
            double root = balances ? Math.Sqrt(sorted[k].Value) : 1;
            Complex[][] vectors = sectors[sorted[k].Sector].Vectors;
            for (int i = 0; i < scale.Length; i++)
            {
                Complex x = 0;
                for (int j = 0; j < vectors.Length; j++)
                    x += vectors[j][i] * sorted[k].Vector[j];
                bool occurs = double.IsFinite(scale[i]) && scale[i] > 0;
                outOf[i, k] = occurs ? x * root / scale[i] : 0;
                into[k, i] = occurs ? Complex.Conjugate(x) * (scale[i] / root) : 0;
            }
        }
        return new LegBasis(into, outOf, [.. sorted.Select(s => sectors[s.Sector].Charge)]);
    }
}
