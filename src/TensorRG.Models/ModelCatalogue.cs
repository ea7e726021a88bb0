namespace TensorRG.Models;

/// <summary>The models that can be named. One line each.</summary>
public static class ModelCatalogue
{
    /// <summary>All built-in models, in the order in which they are listed.</summary>
    public static IReadOnlyList<Model> All { get; } =
    [
        new IsingModel(),
        new PottsModel(),
        new ClockModel(),
        new SixVertexModel(),
    ];

    /// <summary>The model of that name.</summary>
    /// <param name="name">Name, in any case.</param>
    /// <exception cref="ModelException">There is none; the message lists those there are and suggests the nearest.</exception>
    public static Model Find(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        Model? found = All.FirstOrDefault(m => string.Equals(m.Name, name, StringComparison.OrdinalIgnoreCase));
        if (found is not null)
            return found;
        IReadOnlyList<string> known = [.. All.Select(m => m.Name)];
        throw new ModelException($"There is no model '{name}'.{NameSuggestion.Text(name, known)} There are: {string.Join(", ", known)}.");
    }
}
