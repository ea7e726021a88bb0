using System.Collections.Immutable;

namespace TensorRG.Models.Solutions;

/// <summary>
/// Six-vertex model, parameters a, b, c: see <see cref="SixVertexSolution"/>. On the lines, legs 0 or 1 with u + l = d + r: a for 0000 and 1111, b for lines
/// that go straight on (u = d, l = r, u not l), c for those that turn (u = r, l = d, u not l).
/// </summary>
internal sealed class KnownSixVertex : KnownSolution
{
    /// <inheritdoc/>
    public override string Name => "six-vertex";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
        [new(Quantity.LogZPerSite, "any a, b, c (per vertex)", SixVertexSolution.Source)];

    /// <inheritdoc/>
    public override VertexNetwork? Network(ParameterSet parameters)
    {
        double a = parameters["a"], b = parameters["b"], c = parameters["c"];
        double largest = Math.Max(a, Math.Max(b, c));
        (a, b, c) = (a / largest, b / largest, c / largest);
        ImmutableArray<BondState> bond = [new("no line", [0]), new("line", [1])];
        return VertexNetwork.Real([0], bond, bond, Element, 1, Math.Log(largest));

        double Element(int u, int l, int d, int r)
        {
            if (u + l != d + r)
                return 0;
            if (u == l)
                return a;
            return u == d ? b : c;
        }
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
        => quantity == "ln-z"
            ? SixVertexSolution.LogZPerVertex(parameters["a"], parameters["b"], parameters["c"])
            : null;
}
