using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>A row of the table of vertex weights.</summary>
/// <param name="Node">The row in the file.</param>
/// <param name="Legs">The value of each leg.</param>
/// <param name="Weight">The weight.</param>
internal sealed record VertexRow(Node Node, ImmutableArray<Expression> Legs, Expression Weight);
