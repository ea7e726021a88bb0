namespace TensorRG.Models.Files;

/// <summary>Makes models from files.</summary>
public static class ModelFile
{
    /// <summary>The model that a file describes.</summary>
    /// <param name="path">Path of the file.</param>
    /// <exception cref="ModelFileException">It cannot be read, or anything in it is not right.</exception>
    public static FileModel Load(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        return new FileModel(FileText.Load(path));
    }

    /// <summary>The model that a text describes.</summary>
    /// <param name="text">The content of a model file.</param>
    /// <param name="path">Its path, for messages.</param>
    /// <exception cref="ModelFileException">Anything in it is not right.</exception>
    public static FileModel Parse(string text, string path)
    {
        ArgumentNullException.ThrowIfNull(text);
        ArgumentNullException.ThrowIfNull(path);
        return new FileModel(FileText.Check(text, path));
    }

    /// <summary>The model of a text that is known to be right, such as the catalogue's, whose tests fill all tables.</summary>
    /// <param name="text">The content of a model file.</param>
    /// <param name="path">Its path, for messages.</param>
    internal static FileModel Trust(string text, string path) => new(FileText.Check(text, path), isChecked: true);
}
