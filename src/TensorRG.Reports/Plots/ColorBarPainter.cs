using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>Draws the colour bar of a map beside its data area, with ticks and label.</summary>
internal static class ColorBarPainter
{
    public const float Gap = 18;
    public const float Width = 24;

    public static void Paint(SKCanvas canvas, PanelData panel, PanelArea area, PlotFont font)
    {
        var data = area.Data;
        var bar = new SKRect(data.Right + Gap, data.Top, data.Right + Gap + Width, data.Bottom);
        PaintSteps(canvas, bar);
        using var line = new SKPaint { Color = SKColors.Black, StrokeWidth = 1.25f, Style = SKPaintStyle.Stroke, IsAntialias = true };
        canvas.DrawRect(bar, line);
        foreach (var tick in panel.ColorTicks)
        {
            var y = bar.Bottom - (float)((tick.Position - panel.ColorRange.Low) / panel.ColorRange.Length) * bar.Height;
            canvas.DrawLine(bar.Right, y, bar.Right + FigureLayout.TickLength, y, line);
            FigureRenderer.PaintText(canvas, tick.Label, bar.Right + FigureLayout.TickLength + 4, y + 0.36f * FigureLayout.TickSize, FigureLayout.TickSize, Palette.Text, font);
        }
    }

    // Every step reaches down to the end of the bar and is covered by the next ones: no seam shows however the figure is scaled.
    private static void PaintSteps(SKCanvas canvas, SKRect bar)
    {
        using var paint = new SKPaint { IsAntialias = false };
        for (var step = ColorScale.Steps - 1; step >= 0; step--)
        {
            paint.Color = ColorScale.Step(step).ToSKColor();
            canvas.DrawRect(new SKRect(bar.Left, bar.Bottom - (step + 1) * bar.Height / ColorScale.Steps, bar.Right, bar.Bottom), paint);
        }
    }
}
