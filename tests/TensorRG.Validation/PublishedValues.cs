using System.Globalization;
using System.Text.Json;

namespace TensorRG.Validation;

/// <summary>The committed table of published values: each row names its source and how it is known.</summary>
internal static class PublishedValues
{
    private static readonly Lazy<Dictionary<string, double>> Rows = new(Load);

    public static double Of(string id) => Rows.Value[id];

    private static Dictionary<string, double> Load()
    {
        using JsonDocument table = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "reference-values.json")));
        var rows = new Dictionary<string, double>();
        foreach (JsonElement row in table.RootElement.GetProperty("values").EnumerateArray())
        {
            if (double.TryParse(row.GetProperty("value").GetString(), NumberStyles.Float, CultureInfo.InvariantCulture, out double value))
                rows.Add(row.GetProperty("id").GetString()!, value);
        }

        return rows;
    }
}
