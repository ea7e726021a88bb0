using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A drawn figure.</summary>
/// <param name="Svg">The figure as an SVG document whose text is text.</param>
/// <param name="Png">The figure as the bytes of a PNG file.</param>
/// <param name="Notices">What the drawing could not show: points left out, missing fonts. Empty when all is well.</param>
public sealed record RenderedFigure(string Svg, ImmutableArray<byte> Png, ImmutableArray<string> Notices)
{
    /// <summary>Writes both files beside each other.</summary>
    /// <param name="pathWithoutExtension">Path to which .svg and .png are appended; missing folders are created.</param>
    /// <returns>The two paths, SVG first.</returns>
    /// <exception cref="IOException">A file cannot be written.</exception>
    /// <exception cref="UnauthorizedAccessException">The folder or a file is read-only.</exception>
    public ImmutableArray<string> Write(string pathWithoutExtension)
    {
        var svg = pathWithoutExtension + ".svg";
        var png = pathWithoutExtension + ".png";
        ReportFile.WriteText(svg, Svg);
        ReportFile.WriteBytes(png, Png.AsSpan());
        return [svg, png];
    }
}
