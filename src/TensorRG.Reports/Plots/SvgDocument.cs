using System.Globalization;
using System.Xml.Linq;

namespace TensorRG.Reports;

/// <summary>
/// Makes the drawing library's SVG fit for a web page: it scales (viewBox), says what it is (title, desc), names fallback
/// fonts, and its ids carry the figure's own prefix, so that two figures in one page do not take each other's clip paths.
/// </summary>
internal static class SvgDocument
{
    private static readonly XNamespace s_svg = "http://www.w3.org/2000/svg";

    public static string Finish(string svg, Figure figure)
    {
        var document = XDocument.Parse(svg, LoadOptions.PreserveWhitespace);
        var root = document.Root!;
        root.SetAttributeValue("viewBox", string.Create(CultureInfo.InvariantCulture, $"0 0 {figure.Width} {figure.Height}"));
        root.SetAttributeValue("role", "img");
        root.AddFirst(new XElement(s_svg + "title", figure.Title), new XElement(s_svg + "desc", figure.Caption));
        root.Descendants(s_svg + "rect").Where(IsClearing).ToList().ForEach(r => r.Remove());
        var names = NewNames(root, figure.Id);
        foreach (var attribute in root.Descendants().Attributes()) Rewrite(attribute, names);
        return root.ToString(SaveOptions.DisableFormatting) + "\n";
    }

    // Clearing to transparent comes out as a rectangle without a fill, which SVG viewers paint black.
    private static bool IsClearing(XElement rectangle) =>
        rectangle.Attribute("fill") is null && rectangle.Parent!.Name != s_svg + "clipPath";

    // The library numbers clip paths through the life of the process; counting them anew makes the bytes repeatable.
    private static Dictionary<string, string> NewNames(XElement root, string prefix) =>
        root.Descendants().Attributes("id").Select((id, i) => (id.Value, Name: string.Create(CultureInfo.InvariantCulture, $"{prefix}-{i + 1}")))
            .ToDictionary(p => p.Value, p => p.Name, StringComparer.Ordinal);

    private static void Rewrite(XAttribute attribute, Dictionary<string, string> names)
    {
        if (attribute.Name == "id") attribute.Value = names[attribute.Value];
        else if (attribute.Value.StartsWith("url(#", StringComparison.Ordinal)) attribute.Value = $"url(#{names[attribute.Value[5..^1]]})";
        else if (attribute.Name.LocalName == "href" && attribute.Value.StartsWith('#')) attribute.Value = "#" + names[attribute.Value[1..]];
        else if (attribute.Name == "font-family") attribute.Value += ", Verdana, sans-serif";
    }
}
