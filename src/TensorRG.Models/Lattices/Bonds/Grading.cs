using System.Globalization;
using System.Numerics;
using TensorRG.Models.Lattices.Forms;
using TensorRG.Models.Lattices.Symmetries;

namespace TensorRG.Models.Lattices.Bonds;

/// <summary>
/// Decides what symmetry grades the network. Variables on edges: charges that the vertex weights conserve come first, then permutations of
/// the states. Variables on sites: permutations first; without one, charges that the tensor happens to conserve. In the face and row forms
/// every function of a corner is conserved in differences along closed lines, whatever the model: that says nothing and is not looked for.
/// </summary>
internal static class Grading
{
    // Looking at every element of larger tensors would take longer than a charge saves.
    private const int MaxPattern = 1 << 20;

    private const int MaxShown = 12;

    /// <summary>The bases and their charges.</summary>
    public static GradedVertex Find(RawVertex raw, VertexForm form, VertexTerms terms)
    {
        var bases = new VertexBases(raw, form, terms);
        if (form.Form == NetworkForm.Vertex && Conserved(raw, terms) is { Orders.IsEmpty: false } charges)
        {
            (LegBasis v, LegBasis h) = bases.Find(charges);
            return new GradedVertex(v, h, charges.Orders, Text(charges, terms.System.StateLabels));
        }
        StateGroup group = Permutations(terms);
        (LegBasis vertical, LegBasis horizontal) = bases.Find(group);
        return group.IsTrivial && form.Form is NetworkForm.Bond or NetworkForm.Triangles
            ? OfElements(new GradedVertex(vertical, horizontal, [], "none"), raw, terms)
            : new GradedVertex(vertical, horizontal, [.. group.Orders], GroupText.Of(group, terms.System.StateLabels)) { Permutations = [.. group.Generators] };
    }

    private static StateGroup Permutations(VertexTerms terms)
    {
        int q = terms.System.States;
        Complex[][] weights = [.. terms.Weights.All, .. terms.Alternating.All];
        IEnumerable<Complex[]> observables = terms.Observables.SelectMany(static o => o.Terms.Select(static t => t.Values.ToArray()));
        return GroupFinder.Find(q, new TableSymmetry(q, weights), new TableSymmetry(q, weights.Concat(observables)), terms.IsReal);
    }

    private static ConservedCharges? Conserved(RawVertex raw, VertexTerms terms)
    {
        if (raw.Positions > MaxPattern)
            return null;
        Complex[][] weights = [.. terms.Signs.Select(raw.Weights)];
        IEnumerable<int> occurring = Enumerable.Range(0, raw.Positions).Where(p => weights.Any(w => w[p] != 0));
        return ConservedCharges.Find(raw.Vertical, raw.Horizontal, occurring.Select(raw.Legs));
    }

    private static GradedVertex OfElements(GradedVertex vertex, RawVertex raw, VertexTerms terms)
    {
        int v = vertex.Vertical.Size, h = vertex.Horizontal.Size;
        if ((double)v * h * v * h > MaxPattern)
            return vertex;
        var dense = new DenseVertex(raw, vertex.Vertical, vertex.Horizontal);
        Complex[][] tensors = [.. terms.Signs.Select(s => dense.Contract(raw.Weights(s)))];
        double least = 1e-15 * tensors.Max(static t => t.Max(static x => Complex.Abs(x)));
        IEnumerable<(int U, int L, int D, int R)> pattern = Enumerable.Range(0, v * h * v * h)
            .Where(i => tensors.Any(t => Complex.Abs(t[i]) >= least && t[i] != 0))
            .Select(i => (i / (h * v * h), i / (v * h) % h, i / h % v, i % h));
        var charges = ConservedCharges.Find(v, h, pattern);
        string[] labels = [.. Enumerable.Range(0, Math.Max(v, h)).Select(static i => i.ToString(CultureInfo.InvariantCulture))];
        return charges.Orders.IsEmpty
            ? vertex
            : new GradedVertex(
                vertex.Vertical with { Charges = charges.Vertical },
                vertex.Horizontal with { Charges = charges.Horizontal },
                charges.Orders,
                Text(charges, labels));
    }

    private static string Text(ConservedCharges charges, IReadOnlyList<string> labels)
        => string.Join("; ", charges.Orders.Select((n, i) => string.Create(
            CultureInfo.InvariantCulture,
            $"{(n == 0 ? "U(1)" : $"Z{n}")}: conserved on the legs, {Line("vertical", charges.Vertical, i, labels)}, {Line("horizontal", charges.Horizontal, i, labels)}")));

    private static string Line(string name, int[][] charges, int factor, IReadOnlyList<string> labels)
    {
        IEnumerable<string> shown = charges.Select((c, s) => string.Create(CultureInfo.InvariantCulture, $"{labels[s]}: {c[factor]}"));
        return charges.Length > MaxShown ? $"{name} {charges.Length} states" : $"{name} ({string.Join(", ", shown)})";
    }
}
