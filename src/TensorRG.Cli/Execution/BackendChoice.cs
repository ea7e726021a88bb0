using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Execution;

/// <summary>Makes the backend that the user or a stored run names.</summary>
internal static class BackendChoice
{
    /// <exception cref="UsageException">No such backend, or the instruction path that the environment forces is unknown or absent.</exception>
    /// <exception cref="BackendUnavailableException">The library behind the name is missing.</exception>
    public static Backend Create(string name, int threads)
    {
        try
        {
            return Backends.Create(name, threads);
        }
        catch (ArgumentException e)
        {
            throw new UsageException(e.Message, e);
        }
    }
}
