using ScottPlot;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>
/// Broken lines. The drawing library's SVG knows no dash patterns: it draws them solid and complains on standard error. So the
/// dashes are worked out first and drawn as shapes.
/// </summary>
internal static class Dashes
{
    private static readonly float[] s_dashed = [10, 8];
    private static readonly float[] s_dotted = [3, 5];

    /// <summary>Draws a path.</summary>
    /// <param name="canvas">Where to.</param>
    /// <param name="path">In pixels.</param>
    /// <param name="isDotted">Dots; dashes otherwise.</param>
    /// <param name="width">Width of the line.</param>
    /// <param name="color">Its colour.</param>
    public static void Draw(SKCanvas canvas, SKPath path, bool isDotted, float width, Color color)
    {
        using var effect = SKPathEffect.CreateDash(isDotted ? s_dotted : s_dashed, 0);
        using var stroke = new SKPaint { Style = SKPaintStyle.Stroke, StrokeWidth = width, PathEffect = effect, IsAntialias = true };
        using var shape = stroke.GetFillPath(path);
        using var fill = new SKPaint { Style = SKPaintStyle.Fill, Color = color.ToSKColor(), IsAntialias = true };
        if (shape is not null) canvas.DrawPath(shape, fill);
    }
}
