using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Physics.Measurements;
using TensorRG.Reports;
using TensorRG.Runs.Points;

namespace TensorRG.Cli.Output;

/// <summary>A finished sweep as data: what table, JSON and figure have in common.</summary>
/// <param name="Inputs">What was swept.</param>
/// <param name="Points">All points in order.</param>
internal sealed record SweepReport(SweepInputs Inputs, ImmutableArray<PointResult> Points)
{
    public ImmutableArray<string> Quantities => Inputs.Measurement.Quantities;

    /// <summary>The points that failed.</summary>
    public IEnumerable<int> Failed => Enumerable.Range(0, Points.Length).Where(i => Points[i].Measurement is null);

    /// <summary>How many values did not converge.</summary>
    public int NotConverged => Points.Sum(static p => p.Measurement?.Values.Count(static v => !v.IsConverged) ?? 0);

    /// <summary>A value of a point; null where the point failed.</summary>
    public Measured? Value(int point, int quantity) => Points[point].Measurement?.Values[quantity];

    /// <summary>Unit of a quantity in brackets, as the first good point says.</summary>
    public string Unit(int quantity)
        => MeasuredValue.InBrackets(Points.FirstOrDefault(static p => p.Measurement is not null)?.Measurement!.Values[quantity].Unit ?? "");

    /// <summary>The parameters that an axis does not set, at the first point; a temperature that follows the others is left out.</summary>
    public string FixedParameters()
    {
        ParameterSet parameters = Inputs.At(0).Parameters;
        IEnumerable<string> given = parameters.Values.Zip(parameters.Model.Parameters)
            .Where(p => !Inputs.Axes.Any(a => a.Parameters.Contains(p.First.Key)) && !FollowsOthers(p.First.Key))
            .Select(static p => FormattableString.Invariant($"{p.Second.Symbol} = {p.First.Value}"));
        string rule = Inputs.Temperature == TemperatureRule.Critical ? "T critical" : "T critical where known";
        return string.Join(", ", parameters.Values.Where(p => FollowsOthers(p.Key)).Select(_ => rule).Concat(given));
    }

    /// <summary>Remarks that some point carries, each once.</summary>
    public IEnumerable<string> Remarks()
        => Points.SelectMany(static p => p.Measurement?.Remarks ?? []).Distinct();

    /// <summary>One column a parameter, then value, error bar and whether it converged for each quantity.</summary>
    public DataTable Table()
    {
        IEnumerable<TableColumn> parameters = Inputs.Model.Parameters.Select(static p => new TableColumn(p.Name, p.IsInteger ? ColumnKind.WholeNumber : ColumnKind.Number));
        IEnumerable<TableColumn> quantities = Quantities.SelectMany(static q => (TableColumn[])[new(q), new(q + "_error"), new(q + "_converged", ColumnKind.Flag)]);
        var table = new DataTable([.. parameters, .. quantities]);
        for (int i = 0; i < Points.Length; i++)
            table.AddRow([.. ParameterCells(i), .. ValueCells(i)]);
        return table;
    }

    /// <summary>The table on the terminal: the swept parameters, values with bars.</summary>
    /// <param name="rows">Which points.</param>
    public DataTable Screen(IEnumerable<int> rows)
    {
        IEnumerable<TableColumn> axes = Inputs.Axes.Select(static a => new TableColumn(a.Name));
        IEnumerable<TableColumn> quantities = Quantities.Select((q, i) => new TableColumn("value of " + q, ColumnKind.Text) { Title = q + Unit(i) });
        var table = new DataTable([.. axes, .. quantities]);
        foreach (int i in rows)
            table.AddRow([.. Inputs.Coordinates(i).Cast<object?>(), .. Quantities.Select((_, q) => Text(i, q))]);
        return table;
    }

    private bool FollowsOthers(string parameter)
        => parameter == ParameterDefinition.TemperatureName && Inputs.Temperature != TemperatureRule.Given && !Inputs.Axes.Any(a => a.Parameters.Contains(parameter));

    private string Text(int point, int quantity) => Value(point, quantity) is { } value
        ? NumberFormat.WithError(value.Value.Value, value.Value.Error) + (value.IsConverged ? "" : " not converged")
        : "failed";

    private IEnumerable<object?> ParameterCells(int point)
        => Inputs.At(point).Parameters.Values.Zip(Inputs.Model.Parameters).Select(static p => p.Second.IsInteger ? (object?)(long)p.First.Value : p.First.Value);

    private IEnumerable<object?> ValueCells(int point) => Quantities.SelectMany((_, q) => Value(point, q) is { } value
        ? (object?[])[value.Value.Value, value.Value.Error, value.IsConverged]
        : [null, null, null]);
}
