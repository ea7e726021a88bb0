namespace TensorRG.Models;

/// <summary>Names of the common quantities: on the command line and in model files, and for people.</summary>
public static class QuantityNames
{
    private static readonly (Quantity Quantity, string Name, string Words)[] Table =
    [
        (Quantity.LogZPerSite, "ln-z", "ln Z per site"),
        (Quantity.EnergyPerSite, "energy", "energy per site"),
        (Quantity.EntropyPerSite, "entropy", "entropy per site"),
        (Quantity.SpecificHeatPerSite, "specific-heat", "specific heat per site"),
        (Quantity.SpontaneousMagnetisation, "magnetisation", "spontaneous magnetisation"),
        (Quantity.Density, "density", "density"),
        (Quantity.LatentHeat, "latent-heat", "latent heat per site"),
    ];

    /// <summary>All names, in the order in which they are listed.</summary>
    public static IReadOnlyList<string> All { get; } = [.. Table.Select(t => t.Name)];

    /// <summary>The name of a quantity, such as "ln-z".</summary>
    /// <param name="quantity">The quantity.</param>
    public static string Name(Quantity quantity) => Array.Find(Table, t => t.Quantity == quantity).Name;

    /// <summary>The quantity of that name, or null where it is none of the common ones.</summary>
    /// <param name="name">Name, in lower case.</param>
    public static Quantity? Find(string name)
    {
        int index = Array.FindIndex(Table, t => t.Name == name);
        return index < 0 ? null : Table[index].Quantity;
    }

    /// <summary>The quantity in words, such as "ln Z per site"; an observable's name stays as it is.</summary>
    /// <param name="name">Name, in lower case.</param>
    public static string Words(string name)
    {
        int index = Array.FindIndex(Table, t => t.Name == name);
        return index < 0 ? name : Table[index].Words;
    }
}
