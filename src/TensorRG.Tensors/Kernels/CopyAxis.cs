namespace TensorRG.Tensors.Kernels;

/// <summary>One loop of a strided copy.</summary>
/// <param name="Size">Number of steps, at least 2 unless it is the only axis.</param>
/// <param name="Source">Stride in the source.</param>
/// <param name="Target">Stride in the target, not negative.</param>
internal readonly record struct CopyAxis(nint Size, nint Source, nint Target);
