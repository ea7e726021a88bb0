using TensorRG.Models;
using TensorRG.Models.Files;

namespace TensorRG.Cli.Input;

/// <summary>The one place where a word of the command line becomes a model.</summary>
internal static class ModelSource
{
    /// <summary>What the command line says of a model.</summary>
    public const string Help = "Name of a model (see 'tensorrg models'), or the path of a model file ending in .toml.";

    /// <summary>The model of a name or of a file.</summary>
    /// <exception cref="ModelException">There is none, or the file is not right.</exception>
    public static Model Find(string nameOrPath)
    {
        if (!IsPath(nameOrPath))
            return ModelCatalogue.Find(nameOrPath);
        if (!Path.Exists(nameOrPath) && BuiltIn(nameOrPath) is { } name)
            throw new UsageException($"{nameOrPath}: There is no such file, but a built-in model '{name}': name it without folder and .toml, or write its file first: tensorrg models {name} --file > {nameOrPath}");
        return ModelFile.Load(nameOrPath);
    }

    private static string? BuiltIn(string path)
    {
        string stem = Path.GetFileNameWithoutExtension(path);
        return ModelCatalogue.Names.FirstOrDefault(n => string.Equals(n, stem, StringComparison.OrdinalIgnoreCase));
    }

    private static bool IsPath(string text)
        => text.EndsWith(".toml", StringComparison.OrdinalIgnoreCase)
        || text.Contains(Path.DirectorySeparatorChar, StringComparison.Ordinal)
        || text.Contains(Path.AltDirectorySeparatorChar, StringComparison.Ordinal);
}
