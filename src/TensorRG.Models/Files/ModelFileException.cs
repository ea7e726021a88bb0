namespace TensorRG.Models.Files;

/// <summary>A model file that cannot be used. The message reads <c>path:line:column: what is wrong. Remedy.</c></summary>
public sealed class ModelFileException : ModelException
{
    /// <summary>An exception with a standard message.</summary>
    public ModelFileException()
        : this("The model file is not valid. Correct it.")
    {
    }

    /// <summary>An exception that says what is wrong and how to put it right.</summary>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelFileException(string message)
        : base(message)
    {
    }

    /// <summary>An exception that says what is wrong and its cause.</summary>
    /// <param name="message">What is wrong, and the remedy.</param>
    /// <param name="innerException">The cause.</param>
    public ModelFileException(string message, Exception innerException)
        : base(message, innerException)
    {
    }

    /// <summary>An exception at a place in a file.</summary>
    /// <param name="file">Path of the file.</param>
    /// <param name="line">Line, from 1; 0 where the file as a whole is the trouble.</param>
    /// <param name="column">Column in characters, from 1; 0 with line 0.</param>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelFileException(string file, int line, int column, string message)
        : base(line == 0 ? $"{file}: {message}" : FormattableString.Invariant($"{file}:{line}:{column}: {message}"))
    {
        File = file;
        Line = line;
        Column = column;
    }

    /// <summary>Path of the file.</summary>
    public string File { get; } = "";

    /// <summary>Line, from 1; 0 where the file as a whole is the trouble.</summary>
    public int Line { get; }

    /// <summary>Column in characters, from 1; 0 where the file as a whole is the trouble.</summary>
    public int Column { get; }
}
