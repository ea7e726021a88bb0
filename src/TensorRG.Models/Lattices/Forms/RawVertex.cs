using System.Numerics;

namespace TensorRG.Models.Lattices.Forms;

/// <summary>
/// The vertex before any change of basis: a number for each configuration of the outer variables, which fix the states of the legs.
/// All weights are divided by exp(<see cref="LogScale"/>), so that the largest is 1.
/// </summary>
internal sealed class RawVertex
{
    private readonly VertexForm form;
    private readonly VertexTerms terms;
    private readonly int states;

    /// <summary>Finds the scale.</summary>
    /// <exception cref="ModelException">All weights vanish.</exception>
    public RawVertex(VertexForm form, VertexTerms terms)
    {
        this.form = form;
        this.terms = terms;
        states = terms.System.States;
        Positions = Power(form.Outer);
        LogScale = terms.Signs.Max(LargestLog);
        if (double.IsNegativeInfinity(LogScale))
            throw new ModelException("Every configuration of a vertex is excluded, so all weights are zero; allow at least one.");
    }

    /// <summary>Logarithm of the largest weight.</summary>
    public double LogScale { get; }

    /// <summary>Number of configurations of the outer variables.</summary>
    public int Positions { get; }

    /// <summary>States of the legs u and d.</summary>
    public int Vertical => Power(form.Up.Length);

    /// <summary>States of the legs l and r.</summary>
    public int Horizontal => Power(form.Left.Length);

    /// <summary>The states of the four legs in a configuration of the outer variables.</summary>
    public (int U, int L, int D, int R) Legs(int position)
    {
        Span<int> digits = stackalloc int[form.Variables];
        Digits(position, digits[..form.Outer]);
        return (Leg(form.Up, digits), Leg(form.Left, digits), Leg(form.Down, digits), Leg(form.Right, digits));
    }

    /// <summary>The weights of a vertex of this sign, summed over the inner variables.</summary>
    public Complex[] Weights(int sign) => Sum(LogWeight(sign), null, 0, static (w, _) => w);

    /// <summary>The same with absolute values.</summary>
    public Complex[] Magnitudes(int sign) => Sum(LogWeight(sign), null, 0, static (w, _) => Complex.Abs(w));

    /// <summary>The weights multiplied by the n-th power of this vertex's part of an observable.</summary>
    public Complex[] Weighted(LocalObservable observable, int power, int sign)
        => Sum(LogWeight(terms.Signs.Contains(sign) ? sign : 1), Observable(observable, sign), power, static (w, o) => w * o);

    /// <summary>In the bond form the weight between the states of leg u (rows) or l and of the vertex, scaled to a largest element of 1.</summary>
    public Complex[,] BondWeight(Placement[] placements, int sign)
    {
        LocalSum log = LogWeight(placements, sign);
        var matrix = new Complex[states, states];
        double largest = double.NegativeInfinity;
        for (int k = 0; k < states * states; k++)
            largest = Math.Max(largest, log.At([k / states, k % states]).Real);
        for (int k = 0; k < states * states; k++)
            matrix[k / states, k % states] = Exp(log.At([k / states, k % states]), largest);
        return matrix;
    }

    private LocalSum LogWeight(int sign) => LogWeight(form.Placements, sign);

    private LocalSum LogWeight(Placement[] placements, int sign)
    {
        var sum = new LocalSum(states);
        foreach (Placement p in placements)
        {
            double phase = terms.IsReal ? (p.Owns ? 1 : 0) : p.Weight;
            if (terms.Weights[p.Cluster] is { } plain)
                sum.Add(plain, p.Variables, p.Weight, phase);
            if (terms.Alternating[p.Cluster] is { } alternating)
                sum.Add(alternating, p.Variables, p.Weight * p.Sign * sign, phase * p.Sign * sign);
        }
        return sum;
    }

    private LocalSum Observable(LocalObservable observable, int sign)
    {
        var tables = new TermTables();
        tables.Add(observable, 1);
        var sum = new LocalSum(states);
        foreach (Placement p in form.Placements)
        {
            double share = p.Observable * (observable.IsStaggered ? p.Sign * sign : 1);
            if (tables[p.Cluster] is { } table && share != 0)
                sum.Add(table, p.Variables, share, share);
        }
        return sum;
    }

    private double LargestLog(int sign)
    {
        LocalSum log = LogWeight(sign);
        int count = Power(form.Variables);
        var digits = new int[form.Variables];
        double largest = double.NegativeInfinity;
        for (int k = 0; k < count; k++)
        {
            Digits(k, digits);
            largest = Math.Max(largest, log.At(digits).Real);
        }
        return largest;
    }

    private Complex[] Sum(LocalSum log, LocalSum? observable, int power, Func<Complex, Complex, Complex> term)
    {
        var sums = new Complex[Positions];
        int inner = Power(form.Inner);
        var digits = new int[form.Variables];
        for (int k = 0; k < Positions * inner; k++)
        {
            Digits(k, digits);
            Complex weight = Exp(log.At(digits), LogScale);
            if (weight != Complex.Zero)
                sums[k / inner] += term(weight, observable is null ? 1 : PowerOf(observable.At(digits), power));
        }
        return sums;
    }

    private Complex Exp(Complex log, double scale)
    {
        if (double.IsNegativeInfinity(log.Real))
            return 0;
        double size = Math.Exp(log.Real - scale);
        if (terms.IsReal)
            return Math.Round(log.Imaginary / Math.PI) % 2 == 0 ? size : -size;
        return new Complex(size * Math.Cos(log.Imaginary), size * Math.Sin(log.Imaginary));
    }

    private static Complex PowerOf(Complex x, int power)
    {
        Complex result = 1;
        for (int i = 0; i < power; i++)
            result *= x;
        return result;
    }

    private int Leg(int[] variables, ReadOnlySpan<int> digits)
    {
        int index = 0;
        foreach (int v in variables)
            index = (index * states) + digits[v];
        return index;
    }

    private void Digits(int number, Span<int> digits)
    {
        for (int i = digits.Length - 1; i >= 0; i--, number /= states)
            digits[i] = number % states;
    }

    private int Power(int exponent) => (int)Math.Pow(states, exponent);
}
