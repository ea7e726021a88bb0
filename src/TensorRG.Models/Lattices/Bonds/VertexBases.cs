using System.Numerics;
using TensorRG.Models.Lattices.Forms;
using TensorRG.Models.Lattices.Symmetries;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>Finds the bases of the two bonds of a raw vertex.</summary>
internal sealed class VertexBases
{
    private const int MaxPower = 4;

    private readonly RawVertex raw;
    private readonly VertexForm form;
    private readonly VertexTerms terms;

    /// <summary>The bases of one vertex.</summary>
    public VertexBases(RawVertex raw, VertexForm form, VertexTerms terms)
    {
        this.raw = raw;
        this.form = form;
        this.terms = terms;
    }

    /// <summary>Bases in which a group of permutations of the variables' states is diagonal.</summary>
    public (LegBasis Vertical, LegBasis Horizontal) Find(StateGroup group)
        => (Find(true, CharacterBasis.Build(group.OnTuples(form.Up.Length))), Find(false, CharacterBasis.Build(group.OnTuples(form.Left.Length))));

    /// <summary>Bases of raw states with given charges.</summary>
    public (LegBasis Vertical, LegBasis Horizontal) Find(ConservedCharges charges)
        => (Find(true, CharacterBasis.OfUnits(charges.Vertical)), Find(false, CharacterBasis.OfUnits(charges.Horizontal)));

    private LegBasis Find(bool vertical, (int[] Charge, Complex[] Vector)[] basis)
    {
        var columns = new BondColumns(raw, vertical);
        bool isBond = form.VerticalWeight is not null;
        double[] scale = isBond ? [.. Enumerable.Repeat(1.0, columns.States)] : Scale(columns);
        Complex[][,] weights = [.. terms.Signs.Select(s => isBond
            ? raw.BondWeight(vertical ? form.VerticalWeight! : form.HorizontalWeight!, s)
            : columns.Matrix(raw.Weights(s)))];
        return new BondSplit(basis, scale, terms.IsReal, isBond).Find(SideBySide(weights), () => Impurities(columns));
    }

    // The root of (norm on the outgoing leg) / (norm on the ingoing leg): both ends then weigh the same.
    private double[] Scale(BondColumns columns)
    {
        var ingoing = new double[columns.States];
        var outgoing = new double[columns.States];
        foreach (Complex[] sizes in terms.Signs.Select(raw.Magnitudes))
        {
            ingoing = [.. ingoing.Zip(columns.IngoingNorms(sizes), double.Hypot)];
            outgoing = [.. outgoing.Zip(columns.OutgoingNorms(sizes), double.Hypot)];
        }
        return [.. outgoing.Zip(ingoing, static (o, i) => Math.Sqrt(o) / Math.Sqrt(i))];
    }

    // The sign of an observable alone changes no direction.
    private IEnumerable<Complex[,]> Impurities(BondColumns columns)
        => from observable in terms.Observables
           from sign in terms.Signs
           from power in Enumerable.Range(1, MaxPower)
           select columns.Matrix(raw.Weighted(observable, power, sign));

    private static Complex[,] SideBySide(Complex[][,] parts)
    {
        int rows = parts[0].GetLength(0);
        var joined = new Complex[rows, parts.Sum(static p => p.GetLength(1))];
        for ((int k, int start) = (0, 0); k < parts.Length; start += parts[k].GetLength(1), k++)
        {
            for (int i = 0; i < rows; i++)
            {
                for (int j = 0; j < parts[k].GetLength(1); j++)
                    joined[i, start + j] = parts[k][i, j];
            }
        }
        return joined;
    }
}
