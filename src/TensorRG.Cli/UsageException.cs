namespace TensorRG.Cli;

/// <summary>The user asked for something that cannot be done; the message says what and how to put it right.</summary>
internal sealed class UsageException : Exception
{
    public UsageException()
        : this("The command cannot be carried out as given.")
    {
    }

    public UsageException(string message)
        : base(message)
    {
    }

    public UsageException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
