using System.Collections.Immutable;
using System.Text;
using ScottPlot;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>
/// Draws figures. On one machine the same figure gives the same bytes; between machines glyph shapes and widths may
/// differ with the installed fonts.
/// </summary>
public static class FigureRenderer
{
    /// <summary>Draws a figure as SVG and as PNG.</summary>
    /// <param name="figure">The figure; needs a panel.</param>
    /// <exception cref="ArgumentException">The figure has no panel.</exception>
    public static RenderedFigure Render(Figure figure) => Render(figure, PlotFont.Default);

    internal static RenderedFigure Render(Figure figure, PlotFont font)
    {
        if (figure.Panels.IsDefaultOrEmpty) throw new ArgumentException("A figure needs at least one panel.", nameof(figure));
        ImmutableArray<PanelData> panels = [.. figure.Panels.Select(p => new PanelData(p, font.HasSpecialCharacters))];
        var layout = new FigureLayout(figure, panels, font);
        void Paint(SKCanvas canvas) => PaintAll(canvas, figure, panels, layout, font);
        return new RenderedFigure(ToSvg(figure, Paint), ToPng(figure, Paint), [.. panels.SelectMany(p => p.Notices), .. font.Notices]);
    }

    private static string ToSvg(Figure figure, Action<SKCanvas> paint)
    {
        using var stream = new MemoryStream();
        using (var canvas = SKSvgCanvas.Create(new SKRect(0, 0, figure.Width, figure.Height), stream))
            paint(canvas);
        return SvgDocument.Finish(Encoding.UTF8.GetString(stream.ToArray()), figure);
    }

    private static ImmutableArray<byte> ToPng(Figure figure, Action<SKCanvas> paint)
    {
        using var surface = SKSurface.Create(new SKImageInfo(figure.Width, figure.Height));
        paint(surface.Canvas);
        using var image = surface.Snapshot();
        using var data = image.Encode(SKEncodedImageFormat.Png, 100);
        return [.. data.ToArray()];
    }

    private static void PaintAll(SKCanvas canvas, Figure figure, ImmutableArray<PanelData> panels, FigureLayout layout, PlotFont font)
    {
        canvas.Clear(SKColors.White);
        for (var i = 0; i < panels.Length; i++)
        {
            PanelPainter.Paint(canvas, panels[i], layout.Areas[i], figure, font);
            if (panels[i].Panel.Map is not null) ColorBarPainter.Paint(canvas, panels[i], layout.Areas[i], font);
            PaintLabels(canvas, panels[i], layout.Areas[i], figure, font);
            PaintLegend(canvas, layout.Areas[i], font);
        }
        for (var i = 0; i < layout.TitleLines.Length; i++)
            PaintText(canvas, layout.TitleLines[i], FigureLayout.Margin, FigureLayout.TitleBaseline(i), FigureLayout.TitleSize, Palette.Text, font);
        for (var i = 0; i < layout.CaptionLines.Length; i++)
            PaintText(canvas, layout.CaptionLines[i], FigureLayout.Margin, layout.CaptionBaseline(i), FigureLayout.CaptionSize, Palette.FaintText, font);
    }

    private static void PaintLabels(SKCanvas canvas, PanelData panel, PanelArea area, Figure figure, PlotFont font)
    {
        var middle = (area.Data.Left + area.Data.Right) / 2;
        PaintLabel(canvas, panel.XLabel, middle, FigureLayout.XLabelBaseline(area), area.Data.Width, font);
        PaintLabel(canvas, panel.Panel.Top?.Label ?? "", middle, FigureLayout.TopLabelBaseline(area), area.Data.Width, font);
        canvas.Save();
        canvas.RotateDegrees(-90);
        PaintLabel(canvas, panel.YLabel, -(area.Data.Top + area.Data.Bottom) / 2, FigureLayout.YLabelBaseline, area.Data.Height, font);
        PaintLabel(canvas, panel.ColorLabel, -(area.Data.Top + area.Data.Bottom) / 2, figure.Width - FigureLayout.Margin - 0.2f * FigureLayout.LabelSize, area.Data.Height, font);
        canvas.Restore();
    }

    /// <summary>A centred label, made smaller where it would be longer than its axis.</summary>
    private static void PaintLabel(SKCanvas canvas, string text, float centre, float baseline, float room, PlotFont font)
    {
        if (text.Length == 0) return;
        var width = font.Width(text, FigureLayout.LabelSize);
        var shrink = Math.Min(1, room / width);
        PaintText(canvas, text, centre - shrink * width / 2, baseline, shrink * FigureLayout.LabelSize, Palette.Text, font);
    }

    private static void PaintLegend(SKCanvas canvas, PanelArea area, PlotFont font)
    {
        foreach (var entry in area.Legend)
        {
            var centre = FigureLayout.LegendCentre(area, entry);
            PaintKey(canvas, entry, centre);
            PaintText(canvas, entry.Name, entry.Left + FigureLayout.LegendKeyWidth + 8, centre + 0.36f * FigureLayout.LegendSize, FigureLayout.LegendSize, Palette.Text, font);
        }
    }

    private static void PaintKey(SKCanvas canvas, LegendEntry entry, float centre)
    {
        using var paint = Paint.NewDisposablePaint();
        var end = entry.Left + FigureLayout.LegendKeyWidth;
        if (entry.Series is null or { IsGuide: true })
        {
            using var path = new SKPath();
            path.MoveTo(entry.Left, centre);
            path.LineTo(end, centre);
            Dashes.Draw(canvas, path, isDotted: entry.Series is null, PanelPainter.GuideWidth, entry.Series?.Color ?? Palette.Guide);
        }
        else if (entry.Series.HasLine)
        {
            new LineStyle { Width = PanelPainter.LineWidth, Color = entry.Series.Color }.Render(canvas, new PixelLine(entry.Left, centre, end, centre), paint);
        }
        if (entry.Series is { HasMarkers: true } series)
            new MarkerStyle(series.Marker, PanelPainter.MarkerSize, series.Color).Render(canvas, new Pixel(entry.Left + FigureLayout.LegendKeyWidth / 2, centre), paint);
    }

    internal static void PaintText(SKCanvas canvas, string text, float left, float baseline, float size, Color color, PlotFont font)
    {
        using var skFont = font.At(size);
        using var paint = new SKPaint { Color = color.ToSKColor(), IsAntialias = true };
        canvas.DrawText(text, left, baseline, SKTextAlign.Left, skFont, paint);
    }
}
