using System.Numerics;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>
/// The group Z^n modulo the lattice that integer rows span, as a product of cyclic groups: the Smith normal form of the rows, with the column
/// operations kept. Coordinates of the generators of Z^n in it are the most general charges for which all rows are conservation laws.
/// </summary>
internal sealed class IntegerQuotient
{
    private readonly int size;
    private readonly List<BigInteger[]> rows = [];
    private readonly BigInteger[][] columns;

    /// <summary>Z^n itself.</summary>
    public IntegerQuotient(int size)
    {
        this.size = size;
        columns = [.. Enumerable.Range(0, size).Select(i => Unit(i, size))];
    }

    /// <summary>Divides by one more row. Rows are kept in echelon form, so there are never more than n.</summary>
    public void Add(int[] row)
    {
        BigInteger[] rest = [.. row.Select(static x => (BigInteger)x)];
        for (int i = 0; i <= rows.Count; i++)
        {
            int lead = Array.FindIndex(rest, static x => !x.IsZero);
            if (lead < 0)
                return;
            int known = i < rows.Count ? Array.FindIndex(rows[i], static x => !x.IsZero) : size;
            if (lead < known)
            {
                rows.Insert(i, rest);
                return;
            }
            if (lead == known)
                Reduce(rows[i], rest, lead);
        }
    }

    /// <summary>The factors that are not trivial: order (0 for a free one) and the charge of each generator. Free ones first, then large before small orders.</summary>
    public List<(BigInteger Order, BigInteger[] Charges)> Factors()
    {
        for (int k = 0; k < Math.Min(rows.Count, size); k++)
            Diagonalize(k);
        var factors = new List<(BigInteger, BigInteger[])>();
        for (int k = 0; k < size; k++)
        {
            BigInteger order = k < rows.Count ? BigInteger.Abs(rows[k][k]) : 0;
            if (!order.IsOne)
                factors.Add((order, [.. Enumerable.Range(0, size).Select(i => columns[i][k])]));
        }
        return [.. factors.OrderBy(static f => f.Item1.IsZero ? 0 : 1).ThenByDescending(static f => f.Item1)];
    }

    private static BigInteger[] Unit(int i, int size)
    {
        var row = new BigInteger[size];
        row[i] = 1;
        return row;
    }

    // Euclid on two rows until the second has a zero in the column. The first, whose entry is not zero, changes only if that entry gets smaller:
    // else rows and columns could undo each other's work for ever.
    private static void Reduce(BigInteger[] first, BigInteger[] second, int column)
    {
        while (true)
        {
            BigInteger times = BigInteger.Divide(second[column], first[column]);
            for (int j = 0; j < first.Length; j++)
                second[j] -= times * first[j];
            if (second[column].IsZero)
                return;
            for (int j = 0; j < first.Length; j++)
                (first[j], second[j]) = (second[j], first[j]);
        }
    }

    // Brings row k and column k to a single entry; rows below may only help.
    private void Diagonalize(int k)
    {
        if (!Pivot(k))
            return;
        while (true)
        {
            for (int i = k + 1; i < rows.Count; i++)
                Reduce(rows[k], rows[i], k);
            int j = Enumerable.Range(k + 1, size - k - 1).FirstOrDefault(c => !rows[k][c].IsZero, -1);
            if (j < 0)
                return;
            ReduceColumns(k, j);
        }
    }

    private bool Pivot(int k)
    {
        for (int i = k; i < rows.Count; i++)
        {
            int j = Array.FindIndex(rows[i], k, static x => !x.IsZero);
            if (j < 0)
                continue;
            (rows[k], rows[i]) = (rows[i], rows[k]);
            foreach (BigInteger[] row in rows.Concat(columns))
                (row[k], row[j]) = (row[j], row[k]);
            return true;
        }
        return false;
    }

    private void ReduceColumns(int k, int j)
    {
        while (true)
        {
            BigInteger times = BigInteger.Divide(rows[k][j], rows[k][k]);
            foreach (BigInteger[] row in rows.Concat(columns))
                row[j] -= times * row[k];
            if (rows[k][j].IsZero)
                return;
            foreach (BigInteger[] row in rows.Concat(columns))
                (row[k], row[j]) = (row[j], row[k]);
        }
    }
}
