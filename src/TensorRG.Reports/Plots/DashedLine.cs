using System.Collections.Immutable;
using ScottPlot;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>A dashed or dotted line within ScottPlot's frame; see <see cref="Dashes"/>.</summary>
/// <param name="points">Points in axis coordinates.</param>
/// <param name="isDotted">Dots; dashes otherwise.</param>
/// <param name="width">Width in pixels.</param>
/// <param name="color">Its colour.</param>
internal sealed class DashedLine(ImmutableArray<Coordinates> points, bool isDotted, float width, Color color) : IPlottable
{
    public bool IsVisible { get; set; } = true;

    public IAxes Axes { get; set; } = new Axes();

    public IEnumerable<LegendItem> LegendItems => [];

    public AxisLimits GetAxisLimits() => AxisLimits.NoLimits;

    public void Render(RenderPack rp)
    {
        using var path = new SKPath();
        for (var i = 0; i < points.Length; i++)
        {
            var pixel = Axes.GetPixel(points[i]);
            if (i == 0) path.MoveTo(pixel.X, pixel.Y);
            else path.LineTo(pixel.X, pixel.Y);
        }
        Dashes.Draw(rp.Canvas, path, isDotted, width, color);
    }
}
