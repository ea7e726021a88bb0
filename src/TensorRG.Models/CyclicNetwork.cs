using System.Collections.Immutable;
using System.Globalization;

namespace TensorRG.Models;

/// <summary>
/// Vertex networks of models with q spin states s = 0..q-1 on the square lattice whose pair weights depend on the
/// difference alone, W[s,s'] = sum_k (lambda_k / q) exp(2 pi i k (s - s') / q) with W even, so lambda_k = lambda_(q-k) is real.
/// Splitting each bond's lambda_k evenly, its sign to the legs d and r, and summing over s leaves the real tensor
/// A[u,l,d,r] = (1/q) sgn(lambda_d lambda_r) sqrt|lambda_u lambda_l lambda_d lambda_r| phi_(u+l-d-r),
/// where phi_n = sum_s w(s) exp(2 pi i n s / q) / q is the transform of a weight of the single spin: phi_n = 1 for n = 0
/// mod q and zero otherwise when all states weigh the same. The bond states then carry the Z_q charge k.
/// </summary>
internal static class CyclicNetwork
{
    /// <summary>The Z_q-graded network of equal single-spin weights.</summary>
    /// <param name="vertical">Ratios lambda_k / lambda_0 of the vertical bonds.</param>
    /// <param name="horizontal">Ratios lambda_k / lambda_0 of the horizontal bonds.</param>
    /// <param name="logPrefactor">ln(lambda_0 lambda_0' / q).</param>
    public static VertexNetwork Graded(double[] vertical, double[] horizontal, double logPrefactor)
    {
        int q = vertical.Length;
        ImmutableArray<BondState> bond = Bond(q, graded: true);
        Leg v = new(vertical), h = new(horizontal);
        return VertexNetwork.Real([q], bond, bond, Element, 1, logPrefactor);

        double Element(int a, int b, int d, int r) => (a + b - d - r) % q == 0 ? v.In[a] * h.In[b] * v.Out[d] * h.Out[r] : 0;
    }

    /// <summary>The ungraded network with single-spin weights whose transform is real.</summary>
    /// <param name="vertical">Ratios lambda_k / lambda_0 of the vertical bonds.</param>
    /// <param name="horizontal">Ratios lambda_k / lambda_0 of the horizontal bonds.</param>
    /// <param name="site">Ratios phi_n / phi_0 of the single-spin weights.</param>
    /// <param name="logPrefactor">ln(lambda_0 lambda_0' phi_0 / q).</param>
    public static VertexNetwork WithField(double[] vertical, double[] horizontal, double[] site, double logPrefactor)
    {
        int q = vertical.Length;
        ImmutableArray<BondState> bond = Bond(q, graded: false);
        Leg v = new(vertical), h = new(horizontal);
        return VertexNetwork.Real([], bond, bond, Element, 1, logPrefactor);

        double Element(int a, int b, int d, int r)
            => v.In[a] * h.In[b] * v.Out[d] * h.Out[r] * site[(a + b - d - r + (2 * q)) % q];
    }

    private static ImmutableArray<BondState> Bond(int q, bool graded)
        => [.. Enumerable.Range(0, q).Select(k => new BondState(k.ToString(CultureInfo.InvariantCulture), graded ? [k] : []))];

    // Elements of one leg: In on the legs u and l, Out, which takes the sign, on the legs d and r.
    private sealed class Leg(double[] ratios)
    {
        public double[] In { get; } = [.. ratios.Select(x => Math.Sqrt(Math.Abs(x)))];

        public double[] Out { get; } = [.. ratios.Select(x => Math.Sign(x) * Math.Sqrt(Math.Abs(x)))];
    }
}
