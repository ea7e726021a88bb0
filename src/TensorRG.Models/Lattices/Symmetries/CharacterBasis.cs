using System.Numerics;

namespace TensorRG.Models.Lattices.Symmetries;

/// <summary>
/// An orthonormal basis of the states of a leg in which the group is diagonal: on the orbit of a state s the vector of charge k is
/// sum over group elements g^t of exp(-2 pi i k t / N) |g^t s>, normalised. With an inverting permutation each vector is equal to its
/// complex conjugate with the states permuted.
/// </summary>
internal sealed class CharacterBasis
{
    private static readonly Complex[] Quarters = [1, Complex.ImaginaryOne, -1, -Complex.ImaginaryOne];

    private readonly StateGroup group;
    private readonly List<(int[] Charge, Complex[] Vector)> vectors = [];

    private CharacterBasis(StateGroup group) => this.group = group;

    /// <summary>The vectors with their charges, ordered by charge.</summary>
    public static (int[] Charge, Complex[] Vector)[] Build(StateGroup group)
    {
        var basis = new CharacterBasis(group);
        var seen = new bool[group.States];
        for (int s = 0; s < group.States; s++)
        {
            if (!seen[s])
                basis.AddOrbit(s, seen);
        }
        return [.. basis.vectors.OrderBy(static v => v.Charge, Comparer<int[]>.Create(Compare))];
    }

    /// <summary>The states themselves with given charges, ordered by charge.</summary>
    public static (int[] Charge, Complex[] Vector)[] OfUnits(int[][] charges)
    {
        IEnumerable<(int[] Charge, Complex[] Vector)> units = charges.Select(static (c, i) => (c, i)).Select(x =>
        {
            var vector = new Complex[charges.Length];
            vector[x.i] = 1;
            return (x.c, vector);
        });
        return [.. units.OrderBy(static v => v.Charge, Comparer<int[]>.Create(Compare))];
    }

    private static int Compare(int[] a, int[] b)
    {
        int first = a.AsSpan().CommonPrefixLength(b);
        return first == a.Length ? 0 : a[first].CompareTo(b[first]);
    }

    private void AddOrbit(int state, bool[] seen)
    {
        (int[] Exponents, int State)[] images = [.. group.Images(state)];
        int partner = group.Inverting is { } inverting ? inverting[state] : state;
        int[]? back = images.FirstOrDefault(i => i.State == partner).Exponents;
        foreach ((_, int s) in images)
        {
            seen[s] = true;
            if (back is null)
                seen[group.Inverting![s]] = true;
        }
        foreach (int[] charge in group.Charges())
        {
            Complex[] vector = Project(images, charge);
            if (vector.Any(static x => x != 0))
                AddVector(charge, vector, back);
        }
    }

    private void AddVector(int[] charge, Complex[] vector, int[]? back)
    {
        if (group.Inverting is not { } inverting)
        {
            vectors.Add((charge, vector));
            return;
        }
        if (back is not null)
        {
            Complex phase = Root(charge, back, 0.5);
            vectors.Add((charge, [.. vector.Select(x => x * phase)]));
            return;
        }
        double half = Math.Sqrt(0.5);
        Complex[] mirrored = [.. Enumerable.Range(0, group.States).Select(s => Complex.Conjugate(vector[inverting[s]]))];
        vectors.Add((charge, [.. vector.Zip(mirrored, (x, y) => half * (x + y))]));
        vectors.Add((charge, [.. vector.Zip(mirrored, (x, y) => half * Complex.ImaginaryOne * (x - y))]));
    }

    private Complex[] Project((int[] Exponents, int State)[] images, int[] charge)
    {
        var vector = new Complex[group.States];
        foreach ((int[] exponents, int s) in images)
            vector[s] += Root(charge, exponents, -1);
        double norm = Math.Sqrt(vector.Sum(static x => (x.Real * x.Real) + (x.Imaginary * x.Imaginary)));
        return norm < 0.5 ? new Complex[group.States] : [.. vector.Select(x => x / norm)];
    }

    // exp(2 pi i factor sum_j k_j t_j / N_j), exact at quarter turns.
    private Complex Root(int[] charge, int[] exponents, double factor)
    {
        double turn = 0;
        for (int j = 0; j < charge.Length; j++)
            turn += charge[j] * exponents[j] % group.Orders[j] / (double)group.Orders[j];
        double quarters = 4 * factor * turn;
        int nearest = (int)Math.Round(quarters);
        if (Math.Abs(quarters - nearest) < 1e-12)
            return Quarters[nearest & 3];
        return Complex.FromPolarCoordinates(1, quarters * Math.PI / 2);
    }
}
