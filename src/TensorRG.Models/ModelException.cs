namespace TensorRG.Models;

/// <summary>A model or its parameters were asked for something they do not have. The message names what, and the remedy.</summary>
public class ModelException : ArgumentException
{
    /// <summary>An exception with a standard message.</summary>
    public ModelException()
        : this("The model or its parameters are not valid.")
    {
    }

    /// <summary>An exception that says what is wrong and how to put it right.</summary>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelException(string message)
        : base(message)
    {
    }

    /// <summary>An exception that says what is wrong and its cause.</summary>
    /// <param name="message">What is wrong, and the remedy.</param>
    /// <param name="innerException">The cause.</param>
    public ModelException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
