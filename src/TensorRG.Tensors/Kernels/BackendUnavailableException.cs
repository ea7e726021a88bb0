namespace TensorRG.Tensors.Kernels;

/// <summary>A backend was asked for whose native library is not on this machine. The message says how to get it.</summary>
public sealed class BackendUnavailableException : InvalidOperationException
{
    /// <summary>An exception with a standard message.</summary>
    public BackendUnavailableException()
        : this("The backend is not available on this machine.")
    {
    }

    /// <summary>An exception that says what is missing.</summary>
    /// <param name="message">What is missing and the remedy.</param>
    public BackendUnavailableException(string message)
        : base(message)
    {
    }

    /// <summary>An exception that says what is missing, and its cause.</summary>
    /// <param name="message">What is missing and the remedy.</param>
    /// <param name="innerException">The cause.</param>
    public BackendUnavailableException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
