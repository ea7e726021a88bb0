namespace TensorRG.Runs;

/// <summary>A run folder cannot be made, read, written or used. The message names the path and the remedy.</summary>
public sealed class RunStoreException : Exception
{
    /// <summary>An exception with a standard message, of the kind <see cref="RunStoreProblem.Storage"/>.</summary>
    public RunStoreException()
        : this("The run store failed.")
    {
    }

    /// <summary>An exception of the kind <see cref="RunStoreProblem.Storage"/>.</summary>
    /// <param name="message">What is wrong, where, and the remedy.</param>
    public RunStoreException(string message)
        : base(message)
    {
    }

    /// <summary>An exception of the kind <see cref="RunStoreProblem.Storage"/> with its cause.</summary>
    /// <param name="message">What is wrong, where, and the remedy.</param>
    /// <param name="innerException">The cause.</param>
    public RunStoreException(string message, Exception innerException)
        : base(message, innerException)
    {
    }

    /// <summary>An exception of a given kind.</summary>
    /// <param name="problem">The kind.</param>
    /// <param name="message">What is wrong, where, and the remedy.</param>
    /// <param name="innerException">The cause, if there is one.</param>
    public RunStoreException(RunStoreProblem problem, string message, Exception? innerException = null)
        : base(message, innerException)
    {
        Problem = problem;
    }

    /// <summary>Whether the cause is a full disk or quota.</summary>
    public bool IsDiskFull => GuardedFiles.IsDiskFull(InnerException);

    /// <summary>The kind of problem.</summary>
    public RunStoreProblem Problem { get; } = RunStoreProblem.Storage;
}
