using System.Buffers.Binary;
using System.Xml.Linq;
using SkiaSharp;

namespace TensorRG.Reports.Tests;

public class FigureTests
{
    private static readonly XNamespace s_svg = "http://www.w3.org/2000/svg";

    [Theory]
    [MemberData(nameof(Gallery.Names), MemberType = typeof(Gallery))]
    public void Every_figure_draws_as_a_PNG_of_its_size_with_ink_on_it(string name)
    {
        var figure = Gallery.All[name];
        var png = Gallery.Rendered(name).Png.AsSpan();
        Assert.Equal([0x89, (byte)'P', (byte)'N', (byte)'G'], png[..4].ToArray());
        Assert.Equal(figure.Width, BinaryPrimitives.ReadInt32BigEndian(png[16..]));
        Assert.Equal(figure.Height, BinaryPrimitives.ReadInt32BigEndian(png[20..]));
        using var bitmap = SKBitmap.Decode(png);
        var ink = bitmap.Pixels.Count(p => p != SKColors.White) / (double)bitmap.Pixels.Length;
        Assert.InRange(ink, 0.002, figure.Panels.Any(p => p.Map is not null) ? 0.8 : 0.25);
    }

    [Theory]
    [MemberData(nameof(Gallery.Names), MemberType = typeof(Gallery))]
    public void Every_SVG_is_valid_prefixed_and_has_no_black_rectangle(string name)
    {
        var figure = Gallery.All[name];
        var root = XDocument.Parse(Gallery.Rendered(name).Svg).Root!;
        Assert.Equal(s_svg + "svg", root.Name);
        Assert.Equal(FormattableString.Invariant($"0 0 {figure.Width} {figure.Height}"), root.Attribute("viewBox")!.Value);
        Assert.Equal(figure.Title, root.Element(s_svg + "title")!.Value);
        var ids = root.Descendants().Attributes("id").Select(a => a.Value).ToList();
        Assert.Equal(ids.Count, ids.Distinct().Count());
        Assert.All(ids, id => Assert.StartsWith(figure.Id + "-", id, StringComparison.Ordinal));
        var references = root.Descendants().Attributes().Where(a => a.Value.StartsWith("url(#", StringComparison.Ordinal));
        Assert.All(references, r => Assert.Contains(r.Value[5..^1], ids));
        Assert.All(root.Descendants(s_svg + "rect").Where(r => r.Parent!.Name != s_svg + "clipPath"), r => Assert.NotNull(r.Attribute("fill")));
    }

    [SkippableTheory]
    [MemberData(nameof(Gallery.Names), MemberType = typeof(Gallery))]
    public void No_text_overlaps_another_or_leaves_the_figure(string name)
    {
        Skip.If(PlotFont.Default.Notices.Length > 0, "no font on this machine");
        var figure = Gallery.All[name];
        var texts = SvgText.Read(Gallery.Rendered(name).Svg);
        Assert.NotEmpty(texts);
        Assert.All(texts, t => Assert.True(t.Left >= 0 && t.Top >= 0 && t.Right <= figure.Width && t.Bottom <= figure.Height, $"{t} leaves the figure"));
        for (var i = 0; i < texts.Count; i++)
        {
            for (var j = 0; j < i; j++) Assert.False(texts[i].Overlaps(texts[j]), $"{texts[i]} overlaps {texts[j]}");
        }
    }

    [Theory]
    [MemberData(nameof(Gallery.Names), MemberType = typeof(Gallery))]
    public void Title_legend_data_and_caption_keep_to_themselves(string name)
    {
        var figure = Gallery.All[name];
        var layout = new FigureLayout(figure, [.. figure.Panels.Select(p => new PanelData(p, superscripts: true))], PlotFont.Default);
        var above = FigureLayout.TitleBaseline(layout.TitleLines.Length - 1);
        foreach (var area in layout.Areas)
        {
            Assert.True(area.Top > above, "a panel begins above the end of the title or of the panel before");
            var legendEnd = area.Legend.Select(e => FigureLayout.LegendCentre(area, e) + FigureLayout.LegendSize / 2).Append(area.Top).Max();
            Assert.True(legendEnd < area.Data.Top, "the legend covers data");
            Assert.All(area.Legend, e => Assert.True(e.Left + FigureLayout.LegendKeyWidth <= area.Data.Right, "the legend leaves the figure"));
            Assert.True(area.Data.Bottom - area.Data.Top >= 150 && area.Data.Right - area.Data.Left >= 600, "hardly any room for data");
            above = area.Bottom - 1;
        }
        Assert.True(layout.CaptionTop >= layout.Areas[^1].Bottom - 1, "the caption covers the last panel");
    }

    [SkippableFact]
    public void Titles_labels_ticks_legend_and_caption_are_text_once_each()
    {
        Skip.If(PlotFont.Default.Notices.Length > 0, "no font on this machine");
        var texts = SvgText.Read(Gallery.Rendered("convergence").Svg).Select(t => t.Text).ToList();
        string[] expected =
        [
            "Convergence of ln Z per site with the bond dimension", "bond dimension χ", "|relative deviation| of ln Z per site",
            "8", "16", "24", "32", "48", "64", "10⁻⁴", "10⁻⁵", "10⁻⁶", "10⁻⁷", "10⁻⁸", "10⁻⁹",
            "TRG", "HOTRG", "bond-weighted TRG", "slope χ^-3.8", "error bar of the extrapolation",
        ];
        Assert.All(expected, e => Assert.Single(texts, e));
        Assert.Contains(texts, t => t.StartsWith("square Ising", StringComparison.Ordinal));
    }

    [Theory]
    [MemberData(nameof(Cultures.Names), MemberType = typeof(Cultures))]
    public void The_same_figure_gives_the_same_bytes_under_every_culture(string culture)
    {
        foreach (var (name, figure) in Gallery.All)
        {
            var plain = Gallery.Rendered(name);
            var other = Cultures.Run(culture, () => FigureRenderer.Render(figure));
            Assert.True(plain.Svg == other.Svg, name);
            Assert.True(plain.Png.SequenceEqual(other.Png), name);
        }
    }

    [Fact]
    public void Creating_figures_does_not_depend_on_the_culture_either()
    {
        var series = Gallery.Series("a", (8, 1e-3), (16, 1e-4));
        var names = Cultures.Run("comma", () => ConvergencePlot.Create([series], "", referenceSlope: -3.5)).Panels[0].Series.Select(s => s.Name);
        Assert.Equal(["a", "slope χ^-3.5"], names);
    }

    [Fact]
    public void Points_stand_where_their_values_say()
    {
        var svg = XDocument.Parse(Gallery.Rendered("convergence").Svg);
        var squares = svg.Descendants(s_svg + "rect").Where(r => (string?)r.Attribute("fill") == "#D55E00" && r.Parent!.Attribute("clip-path") is not null);
        var centres = squares.Select(r => ((double)r.Attribute("x")! + 5.5, (double)r.Attribute("y")! + 5.5)).ToList();
        Assert.Equal(3, centres.Count);
        // HOTRG series (8, 1.36e-5), (16, 5.62e-7), (24, 1.04e-7): ratios of distances on both axes are those of the logarithms.
        var across = (centres[2].Item1 - centres[0].Item1) / (centres[1].Item1 - centres[0].Item1);
        var down = (centres[2].Item2 - centres[0].Item2) / (centres[1].Item2 - centres[0].Item2);
        Assert.True(Math.Abs(across / (Math.Log(3) / Math.Log(2)) - 1) <= 1e-4);
        Assert.True(Math.Abs(down / (Math.Log(1.36e-5 / 1.04e-7) / Math.Log(1.36e-5 / 5.62e-7)) - 1) <= 1e-4);
    }

    [Fact]
    public void The_reference_line_has_the_slope_asked_for_and_stays_above_the_data()
    {
        var panel = ConvergencePlot.Create([Gallery.Series("a", (8, 1e-3), (16, 1e-4), (32, 3e-5))], "", referenceSlope: -3).Panels[0];
        var (first, last) = (panel.Series[1].Points[0], panel.Series[1].Points[^1]);
        Assert.True(Math.Abs(Math.Log(last.Y / first.Y) / Math.Log(last.X / first.X) + 3) <= 1e-12);
        Assert.True(first.Y >= 2 * 1e-3 && last.Y >= 2 * 3e-5 * (1 - 1e-12));
    }

    [Fact]
    public void What_cannot_be_shown_is_named()
    {
        Assert.Empty(Gallery.Rendered("convergence").Notices);
        Assert.Contains("1 of 5 points of 'one'", Assert.Single(Gallery.Rendered("convergence one series").Notices), StringComparison.Ordinal);
        Assert.Contains("2 of 2 points of 'none'", Assert.Single(Gallery.Rendered("convergence equal").Notices), StringComparison.Ordinal);
        Assert.Contains(Gallery.Rendered("convergence nothing").Notices, n => n.Contains("'error bar of the extrapolation'", StringComparison.Ordinal));
        var flow = Gallery.Rendered("flow").Notices;
        Assert.Contains(flow, n => n.Contains("51 of 51 points of 'n = 7'", StringComparison.Ordinal));
        Assert.Contains(flow, n => n.Contains("beyond the end of the axis", StringComparison.Ordinal));
    }

    [Fact]
    public void A_machine_without_fonts_gets_a_notice_and_plain_labels()
    {
        var font = new PlotFont(PlotFont.Default.Typeface, _ => false);
        var rendered = FigureRenderer.Render(Gallery.All["convergence"], font);
        Assert.Contains("No font was found", Assert.Single(rendered.Notices), StringComparison.Ordinal);
        if (PlotFont.Default.Notices.Length == 0) Assert.Contains(SvgText.Read(rendered.Svg), t => t.Text == "1e-08");
    }

    [Fact]
    public void A_line_breaks_where_a_point_is_missing()
    {
        var panel = LinePlot.Create("gap", "", "", new PlotAxis("x"), new PlotAxis("y"), [Gallery.Series("s", (1, 1), (2, 2), (3, double.NaN), (4, 3), (5, 4), (6, 5))]).Panels[0];
        Assert.Equal([2, 3], new PanelData(panel, superscripts: true).Series[0].Runs.Select(r => r.Length));
    }

    [Fact]
    public void A_figure_without_panels_and_a_flow_without_steps_are_refused()
    {
        Assert.Throws<ArgumentException>(() => FigureRenderer.Render(new Figure("x", "", "", [])));
        Assert.Throws<ArgumentException>(() => FlowPlot.Create([], ""));
    }
}
