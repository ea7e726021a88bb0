using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Output;

/// <summary>The figure of a sweep: lines over one parameter, maps over two.</summary>
internal static class SweepFigure
{
    /// <summary>The figure; null where more than two axes have more than one value.</summary>
    public static Figure? Of(SweepReport report)
    {
        ImmutableArray<SweepAxis> axes = [.. report.Inputs.Axes.Where(static a => a.Values.Length > 1)];
        if (axes.Length == 0)
            axes = [report.Inputs.Axes[0]];
        ImmutableArray<SweepQuantity> quantities = [.. report.Quantities.Select((_, q) => Quantity(report, q))];
        string title = $"{report.Inputs.Model.Title}: {string.Join(", ", report.Quantities)}";
        return axes.Length switch
        {
            1 => SweepPlot.Lines(Axis(report, axes[0]), axes[0].Values, quantities, title, Caption(report, axes), [.. Critical(report, axes[0])]),
            2 => SweepPlot.Maps(Axis(report, axes[0]), axes[0].Values, Axis(report, axes[1]), axes[1].Values, quantities, title, Caption(report, axes)),
            _ => null,
        };
    }

    private static SweepQuantity Quantity(SweepReport report, int quantity)
    {
        var values = Enumerable.Range(0, report.Points.Length).Select(i => report.Value(i, quantity)).ToImmutableArray();
        return new SweepQuantity(
            report.Quantities[quantity] + report.Unit(quantity),
            [.. values.Select(static v => v?.Value.Value ?? double.NaN)],
            [.. values.Select(static v => v?.Value.Error ?? double.NaN)],
            [.. values.Select(static v => v?.IsConverged ?? true)],
            [.. values.Select(static v => v?.Exact?.Value ?? double.NaN)]);
    }

    private static PlotAxis Axis(SweepReport report, SweepAxis axis)
    {
        Model model = report.Inputs.Model;
        ParameterDefinition definition = model.Parameters[model.IndexOf(axis.Parameters[0])];
        string symbol = axis.Parameters.Length > 1 || definition.Symbol == definition.Name ? "" : " " + definition.Symbol;
        return new PlotAxis(axis.Name + symbol + MeasuredValue.InBrackets(definition.Unit)) { IsWhole = definition.IsInteger };
    }

    private static string Caption(SweepReport report, ImmutableArray<SweepAxis> axes)
    {
        IEnumerable<string> single = report.Inputs.Axes.Except(axes).Select(static a => FormattableString.Invariant($"{a.Name} = {a.Values[0]}"));
        string parameters = string.Join(", ", single.Append(report.FixedParameters()).Where(static t => t.Length > 0));
        return (parameters.Length == 0 ? "" : parameters + "; ") + MeasureText.Settings(report.Inputs.Measurement);
    }

    /// <summary>The exact critical temperature, where it lies within the axis and is the same at all points.</summary>
    private static IEnumerable<Guide> Critical(SweepReport report, SweepAxis axis)
    {
        if (axis.Name != ParameterDefinition.TemperatureName)
            yield break;
        double? critical = report.Inputs.Model.CriticalTemperature(report.Inputs.At(0).Parameters).Temperature?.Value;
        if (critical >= axis.Values.Min() && critical <= axis.Values.Max())
            yield return new Guide("exact critical temperature", critical.Value, IsVertical: true);
    }
}
