using TensorRG.Models;

namespace TensorRG.Cli.Input;

/// <summary>The one place where a word of the command line becomes a model, and where a stored model comes back.</summary>
internal static class ModelSource
{
    /// <summary>The model of a name.</summary>
    /// <exception cref="ModelException">There is none.</exception>
    public static Model Find(string nameOrPath) => ModelCatalogue.Find(nameOrPath);

    /// <summary>The text that defines a model; null for one of the catalogue.</summary>
    public static string? Definition(Model model)
    {
        ArgumentNullException.ThrowIfNull(model);
        return null;
    }

    /// <summary>A stored model: from the text that defines it, or of the catalogue.</summary>
    /// <exception cref="ModelException">This program does not know it.</exception>
    public static Model Restore(string name, string? definition) => definition is null
        ? ModelCatalogue.Find(name)
        : throw new ModelException($"The model '{name}' comes from a file, which this version cannot read. Use the version that stored it.");
}
