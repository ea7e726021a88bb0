using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Models;

/// <summary>
/// A square network of one four-leg tensor A[u,l,d,r] (up, left, down, right), described without any tensor type.
/// Leg d of a vertex meets leg u of the vertex below, leg r meets leg l of the vertex to the right, on the same basis:
/// <see cref="VerticalBond"/> for u and d, <see cref="HorizontalBond"/> for l and r.
/// The partition function of a torus of M vertices is Z = exp(M * LogPrefactor) times the contraction of the tensors,
/// and stands for M * SitesPerVertex lattice sites.
/// Legs u and l carry charge in, legs d and r carry charge out: A is zero unless q_u + q_l = q_d + q_r in the group.
/// </summary>
public sealed class VertexNetwork
{
    private readonly Func<int, int, int, int, Complex> element;

    private VertexNetwork(
        ImmutableArray<int> groupOrders,
        ImmutableArray<BondState> verticalBond,
        ImmutableArray<BondState> horizontalBond,
        Func<int, int, int, int, Complex> element,
        bool isReal)
    {
        GroupOrders = groupOrders;
        VerticalBond = verticalBond;
        HorizontalBond = horizontalBond;
        this.element = element;
        IsReal = isReal;
        CheckCharges();
    }

    /// <summary>The symmetry group, one order for each factor: N for Z_N, 0 for U(1); empty for the trivial group.</summary>
    public ImmutableArray<int> GroupOrders { get; }

    /// <summary>Basis of legs u and d.</summary>
    public ImmutableArray<BondState> VerticalBond { get; }

    /// <summary>Basis of legs l and r.</summary>
    public ImmutableArray<BondState> HorizontalBond { get; }

    /// <summary>True if every element is real.</summary>
    public bool IsReal { get; }

    /// <summary>Lattice sites that one vertex stands for.</summary>
    public required int SitesPerVertex { get; init; }

    /// <summary>Logarithm of the factor taken out of each vertex tensor, so that its largest element is about 1.</summary>
    public required double LogPrefactor { get; init; }

    /// <summary>A network of real tensors.</summary>
    /// <param name="groupOrders">The group: N for Z_N, 0 for U(1), empty for none.</param>
    /// <param name="verticalBond">Basis of legs u and d.</param>
    /// <param name="horizontalBond">Basis of legs l and r.</param>
    /// <param name="element">A[u,l,d,r] from the four basis indices; zero where charge is not conserved.</param>
    /// <param name="sitesPerVertex">Lattice sites per vertex.</param>
    /// <param name="logPrefactor">Logarithm of the factor taken out of each vertex.</param>
    /// <exception cref="ArgumentException">A charge does not fit the group.</exception>
    public static VertexNetwork Real(
        ImmutableArray<int> groupOrders,
        ImmutableArray<BondState> verticalBond,
        ImmutableArray<BondState> horizontalBond,
        Func<int, int, int, int, double> element,
        int sitesPerVertex,
        double logPrefactor)
        => new(groupOrders, verticalBond, horizontalBond, (u, l, d, r) => element(u, l, d, r), true)
        {
            SitesPerVertex = sitesPerVertex,
            LogPrefactor = logPrefactor,
        };

    /// <summary>A network of complex tensors; the arguments are those of <see cref="Real"/>.</summary>
    /// <param name="groupOrders">The group: N for Z_N, 0 for U(1), empty for none.</param>
    /// <param name="verticalBond">Basis of legs u and d.</param>
    /// <param name="horizontalBond">Basis of legs l and r.</param>
    /// <param name="element">A[u,l,d,r] from the four basis indices; zero where charge is not conserved.</param>
    /// <param name="sitesPerVertex">Lattice sites per vertex.</param>
    /// <param name="logPrefactor">Logarithm of the factor taken out of each vertex.</param>
    /// <exception cref="ArgumentException">A charge does not fit the group.</exception>
    public static VertexNetwork OfComplex(
        ImmutableArray<int> groupOrders,
        ImmutableArray<BondState> verticalBond,
        ImmutableArray<BondState> horizontalBond,
        Func<int, int, int, int, Complex> element,
        int sitesPerVertex,
        double logPrefactor)
        => new(groupOrders, verticalBond, horizontalBond, element, false)
        {
            SitesPerVertex = sitesPerVertex,
            LogPrefactor = logPrefactor,
        };

    /// <summary>A[u,l,d,r].</summary>
    /// <param name="u">State of the upper leg.</param>
    /// <param name="l">State of the left leg.</param>
    /// <param name="d">State of the lower leg.</param>
    /// <param name="r">State of the right leg.</param>
    public Complex Element(int u, int l, int d, int r) => element(u, l, d, r);

    /// <summary>A[u,l,d,r] of a real network.</summary>
    /// <param name="u">State of the upper leg.</param>
    /// <param name="l">State of the left leg.</param>
    /// <param name="d">State of the lower leg.</param>
    /// <param name="r">State of the right leg.</param>
    /// <exception cref="InvalidOperationException">The network is complex.</exception>
    public double RealElement(int u, int l, int d, int r)
        => IsReal
            ? element(u, l, d, r).Real
            : throw new InvalidOperationException("The elements of this network are complex: use Element.");

    /// <summary>True if q_u + q_l = q_d + q_r, so that A[u,l,d,r] may differ from zero.</summary>
    /// <param name="u">State of the upper leg.</param>
    /// <param name="l">State of the left leg.</param>
    /// <param name="d">State of the lower leg.</param>
    /// <param name="r">State of the right leg.</param>
    public bool ConservesCharge(int u, int l, int d, int r)
    {
        for (int i = 0; i < GroupOrders.Length; i++)
        {
            int flow = VerticalBond[u].Charge[i] + HorizontalBond[l].Charge[i]
                - VerticalBond[d].Charge[i] - HorizontalBond[r].Charge[i];
            if (GroupOrders[i] == 0 ? flow != 0 : flow % GroupOrders[i] != 0)
                return false;
        }
        return true;
    }

    /// <summary>The same network, same basis, with the charges forgotten (the trivial group).</summary>
    public VertexNetwork Ungraded() => new([], Forget(VerticalBond), Forget(HorizontalBond), element, IsReal)
    {
        SitesPerVertex = SitesPerVertex,
        LogPrefactor = LogPrefactor,
    };

    private static ImmutableArray<BondState> Forget(ImmutableArray<BondState> bond)
        => [.. bond.Select(s => s with { Charge = [] })];

    private void CheckCharges()
    {
        foreach (BondState state in VerticalBond.Concat(HorizontalBond))
        {
            bool fits = state.Charge.Length == GroupOrders.Length
                && state.Charge.Zip(GroupOrders).All(c => c.Second == 0 || (c.First >= 0 && c.First < c.Second));
            if (!fits)
                throw new ArgumentException($"The charge of bond state '{state.Label}' does not fit the group; give one component per factor, 0..N-1 for Z_N.");
        }
    }
}
