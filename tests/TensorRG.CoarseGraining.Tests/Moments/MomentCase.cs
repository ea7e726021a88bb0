using System.Numerics;
using TensorRG.CoarseGraining.Moments;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.CoarseGraining.Tests.Moments;

/// <summary>Networks with insertions, and flows on them.</summary>
internal static class MomentCase
{
    public static MomentFlow<T> Run<T>(Tensor<T> site, IReadOnlyList<IReadOnlyList<Tensor<T>>> observables, int bondDimension, int steps, int threads = 1, double sitesPerTensor = 1)
        where T : unmanaged, INumberBase<T>
    {
        var algebra = new TensorAlgebra<T>(Backends.Create(Backends.Default, threads));
        var flow = new MomentFlow<T>(algebra, new CutRule(bondDimension), new InitialNetwork<T>(site, sitesPerTensor, 0), observables);
        while (flow.Step < steps)
            flow.Advance();
        return flow;
    }

    /// <summary>Square Ising, even/odd basis, K = 1/T: s flips the parity of the vertex, so s^n has the elements of the site whose number of odd legs is n mod 2.</summary>
    public static Tensor<double>[] Spin(double coupling, bool graded)
        => [.. Enumerable.Range(1, 4).Select(n => Vertex(graded, n % 2, (u, l, d, r) => Root(coupling, u) * Root(coupling, l) * Root(coupling, d) * Root(coupling, r)))];

    /// <summary>
    /// The two bonds that a vertex owns, o = -s s_right - s s_below: a factor s s' exchanges the two eigenvalues cosh K, sinh K of a bond's weight. The right and the lower
    /// leg take the eigenvalue with n factors over the root that stays with the neighbour.
    /// </summary>
    public static Tensor<double>[] Energy(double coupling, bool graded)
        => [.. Enumerable.Range(1, 4).Select(n => Vertex(graded, 0, (u, l, d, r) =>
        {
            double sum = 0, binomial = 1;
            for (int j = 0; j <= n; binomial = binomial * (n - j) / (j + 1), j++)
                sum += binomial * Bond(coupling, d, j) * Bond(coupling, r, n - j);
            return (n % 2 == 0 ? sum : -sum) * Root(coupling, u) * Root(coupling, l);
        }))];

    /// <summary>
    /// Ising in a field with the spin on the legs: A[u, l, d, r] = delta(d, s) delta(r, s) exp(K s (u + l) + H s), weighted with powers of a function of (s, u, l). State 0 is spin +1.
    /// </summary>
    public static Tensor<double> OnLegs(double coupling, double field, Func<int, int, int, double> o, int power)
    {
        Leg leg = Leg.Plain(2, Arrow.In);
        return Tensor<double>.FromFunction([leg, leg, leg.Dual, leg.Dual], p =>
        {
            int u = 1 - (2 * p.Span[0]), l = 1 - (2 * p.Span[1]), d = 1 - (2 * p.Span[2]), r = 1 - (2 * p.Span[3]);
            return d == r ? Math.Exp((coupling * d * (u + l)) + (field * d)) * Math.Pow(o(d, u, l), power) : 0;
        });
    }

    /// <summary>&lt;O^n&gt; / N^n, n = 1 .. 4, by a sum over all spin configurations of a torus; o is a function of a spin and its upper and left neighbour.</summary>
    public static double[] Sum(int columns, int rows, double coupling, double field, Func<int, int, int, double> o)
    {
        int n = columns * rows;
        var sums = new CompensatedSum[5]; // A plain sum of many thousand terms would be the least accurate number of the comparison.
        for (int c = 0; c < 1 << n; c++)
        {
            double energy = 0, total = 0;
            for (int i = 0; i < n; i++)
            {
                int x = i % columns, y = i / columns;
                int s = At(i), u = At((((y + rows - 1) % rows) * columns) + x), l = At((y * columns) + ((x + columns - 1) % columns));
                energy += (coupling * s * (u + l)) + (field * s);
                total += o(s, u, l);
            }

            double weight = Math.Exp(energy - (coupling * 2 * n));
            for (int k = 0; k <= 4; k++)
                sums[k].Add(weight * Math.Pow(total / n, k));
            int At(int i) => 1 - (2 * ((c >> i) & 1));
        }

        return [.. sums[1..].Select(s => s.Value / sums[0].Value)];
    }

    /// <summary>Moments about the mean of moments n = 1 .. 4.</summary>
    public static Complex[] Central(IReadOnlyList<Complex> m)
    {
        Complex a = m[0];
        return
        [
            0,
            m[1] - (a * a),
            m[2] - (3 * a * m[1]) + (2 * a * a * a),
            m[3] - (4 * a * m[2]) + (6 * a * a * m[1]) - (3 * a * a * a * a),
        ];
    }

    private static double Root(double coupling, int state) => Math.Sqrt(Eigenvalue(coupling, state, 0));

    /// <summary>Eigenvalue of exp(K s s') (s s')^n.</summary>
    private static double Eigenvalue(double coupling, int state, int power) => (state + power) % 2 == 0 ? Math.Cosh(coupling) : Math.Sinh(coupling);

    private static double Bond(double coupling, int state, int power) => Eigenvalue(coupling, state, power) / Root(coupling, state);

    private static Tensor<double> Vertex(bool graded, int parity, Func<int, int, int, int, double> element)
    {
        Leg leg = graded
            ? new Leg(AbelianGroup.Cyclic(2), Arrow.In, [new Sector(new Charge(0), 1), new Sector(new Charge(1), 1)])
            : Leg.Plain(2, Arrow.In);
        return Tensor<double>.FromFunction(
            [leg, leg, leg.Dual, leg.Dual],
            p => p.Span.ToArray().Sum() % 2 == parity ? 2 * element(p.Span[0], p.Span[1], p.Span[2], p.Span[3]) : 0,
            graded ? new Charge(parity) : Charge.Zero);
    }
}
