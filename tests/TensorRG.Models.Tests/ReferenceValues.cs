using System.Globalization;
using System.Text.Json;

namespace TensorRG.Models.Tests;

/// <summary>The table of published values (data/reference-values.json): every row has its source and how it is known.</summary>
internal static class ReferenceValues
{
    private static readonly Dictionary<string, double> Values = Load();

    /// <summary>A value by the row's id.</summary>
    public static double Get(string id) => Values[id];

    /// <summary>The path of a file of test data.</summary>
    public static string PathOf(string file) => Path.Combine(AppContext.BaseDirectory, "data", file);

    private static Dictionary<string, double> Load()
    {
        using JsonDocument document = JsonDocument.Parse(File.ReadAllText(PathOf("reference-values.json")));
        var values = new Dictionary<string, double>();
        foreach (JsonElement row in document.RootElement.GetProperty("values").EnumerateArray())
        {
            if (double.TryParse(row.GetProperty("value").GetString(), NumberStyles.Float, CultureInfo.InvariantCulture, out double value))
                values.Add(row.GetProperty("id").GetString()!, value);
        }
        return values;
    }
}
