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
}
