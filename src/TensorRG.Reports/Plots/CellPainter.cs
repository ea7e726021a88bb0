using System.Collections.Immutable;
using ScottPlot;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>Draws the cells of a map within ScottPlot's frame.</summary>
/// <param name="map">The map.</param>
/// <param name="scale">Its colours.</param>
internal sealed class CellPainter(CellMap map, ColorScale scale) : IPlottable
{
    private const float CrossSize = 5;
    private readonly ImmutableArray<double> _x = CellEdges.Of(map.X);
    private readonly ImmutableArray<double> _y = CellEdges.Of(map.Y);

    public bool IsVisible { get; set; } = true;

    public IAxes Axes { get; set; } = new Axes();

    public IEnumerable<LegendItem> LegendItems => [];

    public AxisLimits GetAxisLimits() => new(_x[0], _x[^1], _y[0], _y[^1]);

    // Rows from the top, columns from the left; each cell reaches one pixel under the next, so that no seam shows when an SVG is scaled.
    public void Render(RenderPack rp)
    {
        using var paint = new SKPaint { IsAntialias = false };
        for (var row = map.Y.Length - 1; row >= 0; row--)
        {
            for (var column = 0; column < map.X.Length;)
            {
                var (first, color) = (column, scale.Of(map[column, row]));
                while (column < map.X.Length && scale.Of(map[column, row]) == color) column++;
                paint.Color = color.ToSKColor();
                rp.Canvas.DrawRect(Rectangle(rp, first, column - 1, row), paint);
            }
        }
        foreach (var place in map.Marked) Cross(rp, place);
    }

    private SKRect Rectangle(RenderPack rp, int first, int last, int row)
    {
        var left = MathF.Round(Axes.GetPixelX(_x[first]));
        var right = MathF.Round(Axes.GetPixelX(_x[last + 1])) + (last + 1 < map.X.Length ? 1 : 0);
        var bottom = MathF.Round(Axes.GetPixelY(_y[row])) + (row > 0 ? 1 : 0);
        var top = MathF.Round(Axes.GetPixelY(_y[row + 1]));
        return new SKRect(left, top, right, bottom);
    }

    private void Cross(RenderPack rp, int place)
    {
        var (row, column) = Math.DivRem(place, map.X.Length);
        var cell = Rectangle(rp, column, column, row);
        var half = Math.Min(CrossSize, 0.35f * Math.Min(cell.Width, cell.Height));
        using var paint = new SKPaint { Color = scale.Contrast(map[column, row]).ToSKColor(), StrokeWidth = 1.5f, IsAntialias = true };
        rp.Canvas.DrawLine(cell.MidX - half, cell.MidY - half, cell.MidX + half, cell.MidY + half, paint);
        rp.Canvas.DrawLine(cell.MidX - half, cell.MidY + half, cell.MidX + half, cell.MidY - half, paint);
    }
}
