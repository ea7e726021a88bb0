using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>A term that counts on every cluster of some kinds.</summary>
/// <param name="Key">Where.</param>
/// <param name="Value">Its value from the variables there.</param>
internal sealed record LocalTerm(ClusterKey Key, Expression Value);
