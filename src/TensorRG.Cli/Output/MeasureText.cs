using Spectre.Console;
using TensorRG.Physics;
using TensorRG.Physics.Measurements;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>A measurement as people read it.</summary>
internal static class MeasureText
{
    public static void Write(IAnsiConsole console, MeasurementInputs inputs, Measurement measurement, string origin)
    {
        console.WriteLine(ModelLine.Of(inputs.Parameters));
        console.WriteLine($"{Settings(inputs)}, {origin}");
        TableView.Write(console, Table(measurement));
        var grid = new Grid().AddColumn(new GridColumn().NoWrap().PadLeft(2).PadRight(3)).AddColumn();
        foreach (Measured measured in measurement.Values)
            Parts(grid, measured);
        foreach (IGrouping<string, Measured> source in measurement.Values.Where(static m => m.Exact is not null).GroupBy(static m => m.Exact!.Source))
            Row(grid, "exact values of", $"{string.Join(", ", source.Select(static m => m.Name))}: {source.Key}");
        string label = "remarks";
        foreach (string remark in measurement.Values.Where(static m => m.Remark.Length > 0).Select(static m => $"{m.Name}: {m.Remark}").Concat(measurement.Remarks))
        {
            Row(grid, label, remark);
            label = "";
        }

        console.Write(grid);
    }

    /// <summary>Method, bond dimension and what else was chosen, in one line.</summary>
    public static string Settings(MeasurementInputs inputs)
    {
        string lattice = inputs.TorusLength is { } length ? FormattableString.Invariant($"torus of {length} x {length} vertices") : "infinite lattice";
        return FormattableString.Invariant($"{inputs.Method}, bond dimension {inputs.BondDimension}, {lattice}");
    }

    private static DataTable Table(Measurement measurement)
    {
        var table = new DataTable(
            new Reports.TableColumn("name", ColumnKind.Text) { Title = "quantity" },
            new Reports.TableColumn("value", ColumnKind.Text),
            new Reports.TableColumn("imaginaryPart", ColumnKind.Text) { Title = "imaginary part" },
            new Reports.TableColumn("unit", ColumnKind.Text),
            new Reports.TableColumn("exact", ColumnKind.Text) { Title = "exact value" },
            new Reports.TableColumn("deviation", ColumnKind.Text),
            new Reports.TableColumn("converged", ColumnKind.Text) { Title = "" });
        foreach (Measured m in measurement.Values)
        {
            table.AddRow(
                m.Name,
                NumberFormat.WithError(m.Value.Value, m.Value.Error),
                m.ImaginaryPart == 0 ? null : NumberFormat.Scientific(m.ImaginaryPart, 6),
                m.Unit is "none" ? "" : m.Unit,
                m.Exact is null ? null : NumberFormat.RoundTrip(m.Exact.Value),
                m.Exact is null ? null : Deviation(m),
                m.IsConverged ? null : "not converged");
        }

        return table;
    }

    private static string Deviation(Measured measured)
        => NumberFormat.Scientific(Math.Abs(MeasuredValue.Deviation(measured))) + (MeasuredValue.IsCovered(measured) == true ? " inside" : " OUTSIDE") + " the bar";

    private static void Parts(Grid grid, Measured measured)
    {
        bool first = true;
        foreach (ErrorPart part in measured.Value.Parts)
        {
            Row(grid, first ? "error of " + measured.Name : "", $"{NumberFormat.Scientific(part.Value),-8} {part.Name}: {part.Basis}");
            first = false;
        }
    }

    private static void Row(Grid grid, string label, string text) => grid.AddRow(new Text(label), new Text(text));
}
