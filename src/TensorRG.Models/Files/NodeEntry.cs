namespace TensorRG.Models.Files;

/// <summary>A key of a table with its value.</summary>
/// <param name="Key">The key.</param>
/// <param name="Start">Offset of the key.</param>
/// <param name="Value">The value.</param>
internal sealed record NodeEntry(string Key, int Start, Node Value);
