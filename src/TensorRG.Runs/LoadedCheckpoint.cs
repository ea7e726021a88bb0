using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>The newest good checkpoint, and what was found wrong with newer ones.</summary>
/// <param name="Snapshot">The verified snapshot; null if the folder has no checkpoint at all.</param>
/// <param name="Refused">Newer checkpoints that were refused, with the reason.</param>
internal sealed record LoadedCheckpoint(Snapshot? Snapshot, IReadOnlyList<(string Name, string Reason)> Refused);
