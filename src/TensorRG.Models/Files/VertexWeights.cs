using System.Collections.Immutable;
using System.Numerics;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>The table of vertex weights at given parameters: what is not listed has weight zero.</summary>
internal sealed class VertexWeights
{
    private readonly Dictionary<int, Complex> weights = [];
    private readonly Dictionary<int, VertexRow> rows = [];
    private readonly Workspace work;
    private readonly StateSpace space;

    private VertexWeights(Workspace work, StateSpace space) => (this.work, this.space) = (work, space);

    /// <summary>The weights.</summary>
    /// <param name="rows">The rows of the table.</param>
    /// <param name="work">The parameters.</param>
    /// <param name="space">The states of an edge.</param>
    /// <exception cref="ModelFileException">A row names no value of the edge variable, or stands there twice.</exception>
    public static VertexWeights Of(ImmutableArray<VertexRow> rows, Workspace work, StateSpace space)
    {
        VertexWeights made = new(work, space);
        foreach (VertexRow row in rows)
            made.Add(row);
        return made;
    }

    /// <summary>The weight at a position of the table over configurations.</summary>
    /// <param name="position">The position, the state of the last leg fastest.</param>
    public Complex At(int position) => weights.GetValueOrDefault(position);

    private void Add(VertexRow row)
    {
        long position = 0;
        foreach (Expression leg in row.Legs)
            position = (position * space.Labels.Length) + State(leg);
        if (position > int.MaxValue)
            throw row.Node.Error("The edge has too many states for a table of weights. Use fewer states.");
        if (rows.TryGetValue((int)position, out VertexRow? earlier))
            throw row.Node.Error($"The table has this row twice, first in line {row.Node.Source.Line(earlier.Node.Start)}. Keep one of them.");
        rows.Add((int)position, row);
        weights.Add((int)position, work.Number(row.Weight));
    }

    private int State(Expression leg)
    {
        Complex value = work.Number(leg);
        int state = Array.FindIndex(space.Values, v => Complex.Abs(v - value) <= 1e-12 * Math.Max(1, Complex.Abs(v)));
        return state >= 0
            ? state
            : throw leg.Spot.Error(0, $"{SourceText.Quote(leg.Text)} is no value of the edge variable. Its values are: {string.Join(", ", space.Labels.Take(20))}.");
    }
}
