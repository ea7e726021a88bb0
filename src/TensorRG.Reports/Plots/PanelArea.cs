using System.Collections.Immutable;
using ScottPlot;

namespace TensorRG.Reports;

/// <summary>Where one panel stands.</summary>
/// <param name="Data">The rectangle between the axes.</param>
/// <param name="Legend">Placed legend entries; none for a single series.</param>
/// <param name="Top">Upper end of the panel, where the legend begins.</param>
/// <param name="Bottom">Lower end of the panel, below its axis label.</param>
internal sealed record PanelArea(PixelRect Data, ImmutableArray<LegendEntry> Legend, float Top, float Bottom);
