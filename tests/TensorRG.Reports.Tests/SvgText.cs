using System.Globalization;
using System.Xml.Linq;

namespace TensorRG.Reports.Tests;

/// <summary>The texts of an SVG with the boxes they cover, read from the glyph positions in the file.</summary>
public sealed record SvgText(string Text, double Left, double Top, double Right, double Bottom)
{
    public static IReadOnlyList<SvgText> Read(string svg) =>
        [.. XDocument.Parse(svg).Descendants().Where(e => e.Name.LocalName == "text").Select(Box)];

    public bool Overlaps(SvgText other) => Left < other.Right && other.Left < Right && Top < other.Bottom && other.Top < Bottom;

    private static SvgText Box(XElement element)
    {
        var size = Numbers(element.Attribute("font-size")!.Value)[0];
        var xs = Numbers(element.Attribute("x")!.Value);
        var y = Numbers(element.Attribute("y")!.Value)[0];
        // The last glyph's width is not in the file: 0.4 em is less than most, so the boxes never overstate.
        (double X, double Y)[] corners = [(xs[0], y - 0.7 * size), (xs[^1] + 0.4 * size, y)];
        var moved = corners.Select(c => Move(c, element.Attribute("transform")?.Value ?? "")).ToArray();
        return new SvgText(element.Value.Trim(), moved.Min(c => c.X), moved.Min(c => c.Y), moved.Max(c => c.X), moved.Max(c => c.Y));
    }

    private static (double X, double Y) Move((double X, double Y) point, string transform)
    {
        if (transform.Length == 0) return point;
        var n = Numbers(transform[(transform.IndexOf('(', StringComparison.Ordinal) + 1)..].TrimEnd(')'));
        if (transform.StartsWith("translate", StringComparison.Ordinal)) return (point.X + n[0], point.Y + (n.Length > 1 ? n[1] : 0));
        if (transform.StartsWith("rotate(-90", StringComparison.Ordinal)) return (point.Y, -point.X);
        if (transform.StartsWith("matrix", StringComparison.Ordinal))
            return (n[0] * point.X + n[2] * point.Y + n[4], n[1] * point.X + n[3] * point.Y + n[5]);
        throw new NotSupportedException(transform);
    }

    private static double[] Numbers(string text) =>
        [.. text.Split([',', ' '], StringSplitOptions.RemoveEmptyEntries).Select(t => double.Parse(t, CultureInfo.InvariantCulture))];
}
