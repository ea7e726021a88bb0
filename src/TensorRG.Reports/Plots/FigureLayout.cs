using System.Collections.Immutable;
using ScottPlot;

namespace TensorRG.Reports;

/// <summary>
/// Where everything stands, in pixels from the top left corner: title, then for each panel its legend and its data
/// area, then the caption. Data areas of all panels share their left and right edges. Nothing lies on data.
/// </summary>
internal sealed class FigureLayout
{
    public const float TitleSize = 25;
    public const float LabelSize = 20;
    public const float TickSize = 18;
    public const float LegendSize = 18;
    public const float CaptionSize = 16;
    public const float Margin = 24;
    public const float TickLength = 8;
    public const float LegendKeyWidth = 44;

    private const float LineSpacing = 1.35f;
    private const float LabelGap = 14;
    private const float LegendGap = 30;
    private readonly PlotFont _font;

    public FigureLayout(Figure figure, ImmutableArray<PanelData> panels, PlotFont font)
    {
        _font = font;
        var width = figure.Width - 2 * Margin;
        TitleLines = font.Wrap(figure.Title, TitleSize, width);
        CaptionLines = font.Wrap(figure.Caption, CaptionSize, width);
        var tickLabels = panels.SelectMany(p => p.YTicks).Select(t => font.Width(t.Label, TickSize)).DefaultIfEmpty().Max();
        var left = MathF.Ceiling(Margin + LabelSize + LabelGap + TickLength + 4 + tickLabels);
        var right = MathF.Floor(figure.Width - Margin - panels.Max(p => Math.Max(LastLabelOverhang(p), ColorBarRoom(p))));
        var legends = panels.Select(p => Legend(p, left, right)).ToList();
        var top = Margin + TitleLines.Length * TitleSize * LineSpacing + 6;
        var bottom = figure.Height - Margin - CaptionLines.Length * CaptionSize * LineSpacing;
        var decoration = panels.Select((p, i) => HeightAbove(p, legends[i]) + HeightBelow(p)).Sum();
        var dataHeight = (bottom - top - decoration) / panels.Length;
        var areas = ImmutableArray.CreateBuilder<PanelArea>();
        foreach (var (panel, legend) in panels.Zip(legends))
        {
            var dataTop = top + HeightAbove(panel, legend);
            var end = dataTop + dataHeight + HeightBelow(panel);
            var data = new PixelRect(left, right, MathF.Round(dataTop + dataHeight), MathF.Round(dataTop));
            areas.Add(new PanelArea(data, legend, MathF.Round(top), MathF.Round(end)));
            top = end;
        }
        Areas = areas.DrainToImmutable();
        CaptionTop = bottom + 4;
    }

    public ImmutableArray<string> TitleLines { get; }

    public ImmutableArray<string> CaptionLines { get; }

    public ImmutableArray<PanelArea> Areas { get; }

    public float CaptionTop { get; }

    public static float TitleBaseline(int line) => Margin + TitleSize * (0.8f + line * LineSpacing);

    public float CaptionBaseline(int line) => CaptionTop + CaptionSize * (1 + line * LineSpacing);

    private static float HeightAbove(PanelData panel, ImmutableArray<LegendEntry> legend)
    {
        var rows = legend.Length == 0 ? 0 : legend[^1].Row + 1;
        var axis = panel.Panel.Top is null ? 0 : LabelSize + LabelGap + TickSize * LineSpacing + TickLength;
        return rows * LegendSize * LineSpacing + axis + 10;
    }

    private static float HeightBelow(PanelData panel) =>
        TickLength + TickSize * LineSpacing + (panel.XLabel.Length == 0 ? 8 : LabelSize + LabelGap + 6);

    private float LastLabelOverhang(PanelData panel)
    {
        var labels = panel.XTicks.Where(t => t.Label.Length > 0).ToList();
        return labels.Count == 0 ? 0 : _font.Width(labels[^1].Label, TickSize) / 2;
    }

    private float ColorBarRoom(PanelData panel) => panel.Panel.Map is null
        ? 0
        : ColorBarPainter.Gap + ColorBarPainter.Width + TickLength + 4 + panel.ColorTicks.Select(t => _font.Width(t.Label, TickSize)).DefaultIfEmpty().Max() + LabelGap + LabelSize;

    /// <summary>One series alone needs no legend: title and axis say what it is.</summary>
    private ImmutableArray<LegendEntry> Legend(PanelData panel, float left, float right)
    {
        var series = panel.Series.Where(s => s.Series.Name.Length > 0 && s.Runs.Length > 0).Select(s => (s.Series.Name, (PlottedSeries?)s));
        var guides = panel.VisibleGuides.Where(g => g.Name.Length > 0).Select(g => (g.Name, (PlottedSeries?)null));
        var named = series.Concat(guides).ToList();
        return named.Count < 2 ? [] : Place(named, left, right);
    }

    private ImmutableArray<LegendEntry> Place(IEnumerable<(string Name, PlottedSeries? Series)> named, float left, float right)
    {
        var entries = ImmutableArray.CreateBuilder<LegendEntry>();
        var (x, row) = (left, 0);
        foreach (var (name, series) in named)
        {
            var width = LegendKeyWidth + 8 + _font.Width(name, LegendSize);
            if (x > left && x + width > right) (x, row) = (left, row + 1);
            entries.Add(new LegendEntry(name, series, x, row));
            x += width + LegendGap;
        }
        return entries.DrainToImmutable();
    }

    public static float XLabelBaseline(PanelArea area) => area.Data.Bottom + TickLength + TickSize * LineSpacing + LabelSize;

    public static float TopLabelBaseline(PanelArea area) => area.Data.Top - TickLength - TickSize * LineSpacing - LabelGap;

    /// <summary>Baseline of the upright label, an x because the text runs upwards.</summary>
    public static float YLabelBaseline => Margin + 0.8f * LabelSize;

    public static float LegendCentre(PanelArea area, LegendEntry entry) => area.Top + LegendSize * (0.5f + entry.Row * LineSpacing);
}
