using SkiaSharp;

namespace TensorRG.Reports.Tests;

public class SweepPlotTests
{
    /// <summary>Ends of the published table of viridis, (0.267004, 0.004874, 0.329415) and (0.993248, 0.906157, 0.143936): from memory.</summary>
    [Fact]
    public void Colours_run_from_the_smallest_to_the_largest_value()
    {
        var scale = new ColorScale(new AxisRange(-2, 6));
        AssertNear([0.267004, 0.004874, 0.329415], scale.Of(-2));
        AssertNear([0.993248, 0.906157, 0.143936], scale.Of(6));
        Assert.Equal(scale.Of(-2), scale.Of(-3));
        Assert.Equal(ColorScale.NoValue, scale.Of(double.NaN));
        Assert.DoesNotContain(ColorScale.NoValue, Enumerable.Range(0, ColorScale.Steps).Select(ColorScale.Step));
    }

    /// <summary>What makes a scale honest in grey print: luminance (ITU-R BT.709 weights) grows from step to step.</summary>
    [Fact]
    public void Colours_get_lighter_all_the_way()
    {
        double[] luminance = [.. Enumerable.Range(0, ColorScale.Steps).Select(ColorScale.Step).Select(c => 0.2126 * c.R + 0.7152 * c.G + 0.0722 * c.B)];
        for (var i = 8; i < luminance.Length; i += 8) Assert.True(luminance[i] > luminance[i - 8], $"step {i}");
    }

    [Fact]
    public void Cells_meet_half_way_between_their_values()
    {
        Assert.Equal([0.5, 1.5, 3, 5], CellEdges.Of([1, 2, 4]).AsEnumerable());
        Assert.Equal(2, CellEdges.Of([7]).Length);
        var edges = CellEdges.Of([-1e308, 1e308]);
        Assert.Equal(0, edges[1]);
    }

    /// <summary>The middle of each cell in the picture has the colour of its value: nothing is turned, mirrored or mixed up.</summary>
    [Fact]
    public void Every_cell_stands_in_its_place()
    {
        // Columns 1, 2, 3 out of order and rows 10, 20: value = 10 x + y / 10, unmistakable.
        double[] columns = [2, 3, 1], rows = [20, 10];
        double[] values = [.. columns.SelectMany(x => rows.Select(y => 10 * x + y / 10))];
        var quantity = new SweepQuantity("v", [.. values], [.. values.Select(_ => 0.0)], [.. values.Select(_ => true)], [.. values.Select(_ => double.NaN)]);
        var figure = SweepPlot.Maps(new PlotAxis("x"), [.. columns], new PlotAxis("y"), [.. rows], [quantity], "t", "c");
        var panel = new PanelData(figure.Panels[0], superscripts: true);
        var area = new FigureLayout(figure, [panel], PlotFont.Default).Areas[0].Data;
        var scale = new ColorScale(panel.ColorRange);
        using var bitmap = SKBitmap.Decode(FigureRenderer.Render(figure).Png.AsSpan());
        foreach (var x in columns)
        {
            foreach (var y in rows)
            {
                var right = area.Left + (x - panel.XRange.Low) / panel.XRange.Length * area.Width;
                var down = area.Bottom - (y - panel.YRange.Low) / panel.YRange.Length * area.Height;
                Assert.Equal(scale.Of(10 * x + y / 10).ToSKColor(), bitmap.GetPixel((int)right, (int)down));
            }
        }
    }

    [Fact]
    public void Cells_without_a_value_are_named_and_crosses_and_holes_are_explained()
    {
        Assert.Contains("1 of 4 cells of 'constant' have no value", Assert.Single(Gallery.Rendered("map awkward").Notices), StringComparison.Ordinal);
        Assert.Contains("; crosses: not converged; grey: no value", Gallery.All["map awkward"].Caption, StringComparison.Ordinal);
        Assert.DoesNotContain("grey", Gallery.All["map"].Caption, StringComparison.Ordinal);
    }

    [Fact]
    public void Lines_are_sorted_and_each_sign_is_explained_once()
    {
        var quantity = new SweepQuantity("v", [1, 2, 3], [0.1, 0.1, 0.1], [true, false, true], [double.NaN, 2.1, double.NaN]);
        var figure = SweepPlot.Lines(new PlotAxis("x"), [3, 1, 2], [quantity, quantity], "t", "c", new Guide("critical", 2.5, IsVertical: true));
        var first = figure.Panels[0];
        Assert.Equal(["exact", "measured, with error bar", "not converged"], first.Series.Select(s => s.Name));
        Assert.Equal([(1.0, 2.0), (2, 3), (3, 1)], first.Series[1].Points.Select(p => (p.X, p.Y)));
        Assert.Equal([1.0], first.Series[2].Points.Select(p => p.X));
        Assert.Equal("critical", first.Guides[0].Name);
        Assert.All(figure.Panels[1].Series, s => Assert.Empty(s.Name));
        Assert.Empty(figure.Panels[1].Guides[0].Name);
        Assert.Equal(("", "x"), (first.X.Label, figure.Panels[1].X.Label));
    }

    private static void AssertNear(double[] published, ScottPlot.Color color)
    {
        byte[] channels = [color.R, color.G, color.B];
        Assert.All(channels.Zip(published), pair => Assert.True(Math.Abs(pair.First / 255.0 - pair.Second) <= 1 / 255.0));
    }

    [Fact]
    public void Fine_maps_make_files_of_bearable_size()
        => Assert.InRange(Gallery.Rendered("map fine").Svg.Length, 10_000, 2_000_000);
}
