using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>A named expression of [constants].</summary>
/// <param name="Name">Its name.</param>
/// <param name="Start">Offset of its key.</param>
/// <param name="Value">Its value.</param>
internal sealed record FileConstant(string Name, int Start, Expression Value);
