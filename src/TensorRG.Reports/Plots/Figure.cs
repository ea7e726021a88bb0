using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A figure as data: what <see cref="FigureRenderer"/> turns into SVG and PNG.</summary>
/// <param name="Id">Short name; prefixes the ids inside the SVG, so that several figures fit in one HTML page.</param>
/// <param name="Title">What the figure shows, one line.</param>
/// <param name="Caption">Model, parameters and scheme: what a reader needs to make it again.</param>
/// <param name="Panels">Coordinate systems from top to bottom, aligned with one another.</param>
public sealed record Figure(string Id, string Title, string Caption, ImmutableArray<PlotPanel> Panels)
{
    /// <summary>Width in pixels, and in user units of the SVG.</summary>
    public int Width { get; init; } = 1200;

    /// <summary>Height in pixels, and in user units of the SVG.</summary>
    public int Height { get; init; } = 800;
}
