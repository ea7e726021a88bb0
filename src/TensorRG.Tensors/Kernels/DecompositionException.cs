namespace TensorRG.Tensors.Kernels;

/// <summary>A decomposition did not converge or was asked of a matrix with NaN or infinite elements.</summary>
public sealed class DecompositionException : ArithmeticException
{
    /// <summary>An exception with a standard message.</summary>
    public DecompositionException()
        : this("A matrix decomposition failed.")
    {
    }

    /// <summary>An exception that says what failed.</summary>
    /// <param name="message">Which decomposition, of what size, and why it failed.</param>
    public DecompositionException(string message)
        : base(message)
    {
    }

    /// <summary>An exception that says what failed and its cause.</summary>
    /// <param name="message">Which decomposition, of what size, and why it failed.</param>
    /// <param name="innerException">The cause.</param>
    public DecompositionException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
