using System.Collections.Concurrent;
using System.Collections.Immutable;
using TensorRG.Models.Files;

namespace TensorRG.Models;

/// <summary>The models that ship with the tool: the files of the folder Catalogue, each read when it is first asked for.</summary>
public static class ModelCatalogue
{
    private const string Folder = "Catalogue/";
    private const string Extension = ".toml";

    private static readonly ConcurrentDictionary<string, FileModel> Read = new(StringComparer.OrdinalIgnoreCase);

    /// <summary>The names, in alphabetical order.</summary>
    public static ImmutableArray<string> Names { get; } =
    [
        .. typeof(ModelCatalogue).Assembly.GetManifestResourceNames()
            .Where(static r => r.StartsWith(Folder, StringComparison.Ordinal) && r.EndsWith(Extension, StringComparison.Ordinal))
            .Select(static r => r[Folder.Length..^Extension.Length])
            .Order(StringComparer.Ordinal),
    ];

    /// <summary>All models of the catalogue, in the order of their names.</summary>
    public static IReadOnlyList<Model> All => [.. Names.Select(Find)];

    /// <summary>The model of that name.</summary>
    /// <param name="name">Name, in any case.</param>
    /// <exception cref="ModelException">There is none; the message lists those there are and suggests the nearest.</exception>
    public static Model Find(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        string? found = Names.FirstOrDefault(n => string.Equals(n, name, StringComparison.OrdinalIgnoreCase));
        return found is not null
            ? Read.GetOrAdd(found, Load)
            : throw new ModelException($"There is no model '{name}'.{NameSuggestion.Text(name, Names)} There are: {string.Join(", ", Names)}. A model of your own: give the path of its file, such as ./my-model.toml.");
    }

    /// <summary>The text that a stored run needs to find its model again: null for a model of the catalogue.</summary>
    /// <param name="model">Any model.</param>
    public static string? StoredText(Model model)
    {
        ArgumentNullException.ThrowIfNull(model);
        return Read.TryGetValue(model.Name, out FileModel? own) && ReferenceEquals(own, model) ? null : model.Definition;
    }

    /// <summary>The model of a stored run.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="text">Its text, or null for a model of the catalogue.</param>
    /// <exception cref="ModelException">This program does not know it.</exception>
    public static Model Restore(string name, string? text) => text is null ? Find(name) : ModelFile.Parse(text, name + Extension);

    private static FileModel Load(string name)
    {
        using Stream stream = typeof(ModelCatalogue).Assembly.GetManifestResourceStream(Folder + name + Extension)!;
        using var reader = new StreamReader(stream);
        return ModelFile.Trust(reader.ReadToEnd(), Folder + name + Extension);
    }
}
