namespace TensorRG.CoarseGraining;

/// <summary>A snapshot lacks a value or holds one that cannot belong to the computation it is restored into.</summary>
public sealed class SnapshotException : Exception
{
    /// <summary>An exception with a standard message.</summary>
    public SnapshotException()
        : this("The snapshot does not fit the computation.")
    {
    }

    /// <summary>An exception that names what does not fit.</summary>
    /// <param name="message">Which value is missing or wrong.</param>
    public SnapshotException(string message)
        : base(message)
    {
    }

    /// <summary>An exception that names what does not fit, and its cause.</summary>
    /// <param name="message">Which value is missing or wrong.</param>
    /// <param name="innerException">The cause.</param>
    public SnapshotException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
