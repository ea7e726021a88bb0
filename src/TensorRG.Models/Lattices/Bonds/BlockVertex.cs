using System.Numerics;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>A block of 2 x 2 vertices of alternating kind as one tensor; its legs are pairs, upper before lower, left before right.</summary>
/// <param name="V">States of the legs u and d of a vertex.</param>
/// <param name="H">States of the legs l and r of a vertex.</param>
internal sealed record BlockVertex(int V, int H)
{
    /// <summary>Number of elements of the block's tensor.</summary>
    public static double Elements(int v, int h) => Math.Pow((double)v * h, 4);

    /// <summary>
    /// sum over n1 + n2 + n3 + n4 = n of n! / (n1! n2! n3! n4!) times the block of the members' n_i-th powers: the n-th power of a sum.
    /// </summary>
    /// <param name="even">The tensor of power 0 to n at the upper left and the lower right.</param>
    /// <param name="odd">The same at the upper right and the lower left.</param>
    /// <param name="power">n.</param>
    public Complex[] Power(Func<int, Complex[]> even, Func<int, Complex[]> odd, int power)
    {
        var result = new Complex[(int)Elements(V, H)];
        for (int upper = 0; upper <= power; upper++)
            Stack(Pair(even, odd, upper), Pair(odd, even, power - upper), Binomial(power, upper), result);
        return result;
    }

    private static double Binomial(int n, int k) => k == 0 ? 1 : Binomial(n - 1, k - 1) * n / k;

    // Two vertices side by side: [u1 u2, l, d1 d2, r].
    private Complex[] Pair(Func<int, Complex[]> left, Func<int, Complex[]> right, int power)
    {
        var pair = new Complex[V * V * H * V * V * H];
        for (int k = 0; k <= power; k++)
            AddPair(left(k), right(power - k), Binomial(power, k), pair);
        return pair;
    }

    private void AddPair(Complex[] a, Complex[] b, double factor, Complex[] pair)
    {
        for (int from = 0; from < a.Length; from++)
        {
            if (a[from] == 0)
                continue;
            Complex x = factor * a[from];
            (int u1, int l, int d1, int middle) = (from / (H * V * H), from / (V * H) % H, from / H % V, from % H);
            for (int u2 = 0; u2 < V; u2++)
            {
                for (int d2 = 0; d2 < V; d2++)
                {
                    int to = ((((((((u1 * V) + u2) * H) + l) * V) + d1) * V) + d2) * H;
                    int b0 = ((((u2 * H) + middle) * V) + d2) * H;
                    for (int r = 0; r < H; r++)
                        pair[to + r] += x * b[b0 + r];
                }
            }
        }
    }

    private void Stack(Complex[] upper, Complex[] lower, double factor, Complex[] result)
    {
        int w = V * V;
        for (int from = 0; from < upper.Length; from++)
        {
            if (upper[from] == 0)
                continue;
            Complex x = factor * upper[from];
            (int u, int l1, int middle, int r1) = (from / (H * w * H), from / (w * H) % H, from / H % w, from % H);
            for (int l2 = 0; l2 < H; l2++)
            {
                for (int d = 0; d < w; d++)
                {
                    int to = ((((((((u * H) + l1) * H) + l2) * w) + d) * H) + r1) * H;
                    int b0 = ((((middle * H) + l2) * w) + d) * H;
                    for (int r2 = 0; r2 < H; r2++)
                        result[to + r2] += x * lower[b0 + r2];
                }
            }
        }
    }
}
