namespace TensorRG.Tensors.Kernels;

/// <summary>Whether a backend can be used on this machine.</summary>
/// <param name="Name">The name to give to <see cref="Backends.Create"/>.</param>
/// <param name="IsAvailable">Whether <see cref="Backends.Create"/> will succeed.</param>
/// <param name="Remark">What runs underneath, or what is missing and the remedy.</param>
public sealed record BackendStatus(string Name, bool IsAvailable, string Remark);
