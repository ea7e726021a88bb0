using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using TensorRG.Models.Lattices.Bonds;
using TensorRG.Models.Lattices.Forms;
using TensorRG.Models.Lattices.Symmetries;

namespace TensorRG.Models.Lattices;

/// <summary>
/// Writes a lattice model as a square network of one four-leg tensor, exactly: any term a form can hold, excluded configurations, complex
/// weights, fields, observables. The largest commutative symmetry that is found gives the legs their charges.
/// </summary>
public static class NetworkBuilder
{
    /// <summary>Builds the network.</summary>
    /// <param name="system">The model with all numbers filled in.</param>
    /// <param name="options">The form, the observables and the fields.</param>
    /// <exception cref="ModelException">
    /// The form cannot hold the terms, the tensor would be too large (more than 2^27 elements), all weights vanish, or a table or a name is wrong.
    /// </exception>
    public static ModelNetwork Build(LatticeSystem system, NetworkOptions options)
    {
        ArgumentNullException.ThrowIfNull(system);
        ArgumentNullException.ThrowIfNull(options);
        var terms = new VertexTerms(system, options);
        (VertexForm form, string why) = FormChoice.Choose(system, options.Form, terms.Used);
        var raw = new RawVertex(form, terms);
        GradedVertex graded = Grading.Find(raw, form, terms);
        var cells = new Cells(raw, terms, graded.Vertical, graded.Horizontal);
        VertexNetwork network = Network(cells, graded, form, terms, raw, out double scale);
        ImmutableArray<Impurity> impurities = [.. terms.Observables.Select(o => Impurity(cells, o, network, form, scale))];
        return options.Graded
            ? new ModelNetwork(network, impurities, form.Form, why, graded.Symmetry)
            : new ModelNetwork(network.Ungraded(), impurities, form.Form, why, "none");
    }

    /// <summary>What <see cref="Build"/> would build, without the elements.</summary>
    /// <param name="system">The model with all numbers filled in.</param>
    /// <param name="form">The form asked for.</param>
    /// <exception cref="ModelException">As for <see cref="Build"/>.</exception>
    public static NetworkPlan Plan(LatticeSystem system, NetworkForm form = NetworkForm.Auto)
    {
        ArgumentNullException.ThrowIfNull(system);
        var terms = new VertexTerms(system, new NetworkOptions { Form = form });
        (VertexForm chosen, string why) = FormChoice.Choose(system, form, terms.Used);
        GradedVertex graded = Grading.Find(new RawVertex(chosen, terms), chosen, terms);
        Cells.RequireSize(graded.Vertical, graded.Horizontal, terms.NeedsBlock);
        return new NetworkPlan(
            chosen.Form, why, [.. FormChoice.Others(system, chosen.Form, terms.Used)], graded.Symmetry, graded.Orders, States(graded.Vertical.Charges), States(graded.Horizontal.Charges), terms.IsReal)
        {
            SitesPerVertex = chosen.Sites,
            Breaking = Breaking(system, graded),
        };
    }

    // On edges every observable is a function of the legs, so that it keeps what the vertex conserves.
    private static ImmutableHashSet<string>? Breaking(LatticeSystem system, GradedVertex graded)
        => graded.Permutations.IsEmpty && !graded.Orders.IsEmpty && !system.OnEdges
            ? null
            : [.. system.Observables.Where(o => graded.Permutations.Any(p => ObservableSymmetry.Breaks(o, p))).Select(static o => o.Name)];

    private static VertexNetwork Network(Cells cells, GradedVertex graded, VertexForm form, VertexTerms terms, RawVertex raw, out double scale)
    {
        ImmutableArray<BondState> vertical = States(cells.Vertical(graded.Orders)), horizontal = States(cells.Horizontal(graded.Orders));
        Complex[] elements = cells.Weights();
        double largest = elements.Select(static x => Complex.Abs(x)).DefaultIfEmpty(0).Max(); // No state may occur on both ends of a bond.
        if (largest == 0)
            throw new ModelException("All elements of the vertex vanish: no configuration of a row of vertices is allowed; allow at least one.");
        scale = largest;
        int members = terms.NeedsBlock ? 4 : 1;
        double logPrefactor = (members * raw.LogScale) + Math.Log(largest);
        var values = new Elements(elements, vertical.Length, horizontal.Length, largest);
        VertexNetwork network = terms.IsReal
            ? VertexNetwork.Real(graded.Orders, vertical, horizontal, values.RealAt, form.Sites * members, logPrefactor)
            : VertexNetwork.OfComplex(graded.Orders, vertical, horizontal, values.At, form.Sites * members, logPrefactor);
        if (form.VerticalWeight is not null)
            values.DropRoundOff(cells.Magnification());
        values.Conserve(network, terms.IsReal, cells.Magnification());
        return network;
    }

    private static Impurity Impurity(Cells cells, LocalObservable observable, VertexNetwork network, VertexForm form, double scale)
    {
        int v = network.VerticalBond.Length, h = network.HorizontalBond.Length;
        Lazy<Elements>[] powers = [.. Enumerable.Range(1, 4).Select(n => new Lazy<Elements>(() => Weighted(n)))];
        return new Impurity(observable.Name, (n, u, l, d, r) => n is >= 1 and <= 4
            ? powers[n - 1].Value.At(u, l, d, r)
            : throw new ArgumentOutOfRangeException(nameof(n), n, "The power of an observable in one vertex is 1 to 4."));

        Elements Weighted(int n)
        {
            var elements = new Elements(cells.Weighted(observable, n), v, h, scale);
            if (form.VerticalWeight is not null)
                elements.DropRoundOff(cells.Magnification());
            return elements;
        }
    }

    private static ImmutableArray<BondState> States(int[][] charges)
        => [.. charges.Select(static (c, i) => new BondState(i.ToString(CultureInfo.InvariantCulture), [.. c]))];
}
