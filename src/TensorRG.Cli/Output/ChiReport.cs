using System.Collections.Immutable;
using TensorRG.Cli.Execution;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>A bond-dimension scan as data: table, extrapolation, figure.</summary>
internal sealed class ChiReport
{
    public ChiReport(ImmutableArray<RunReport> runs)
    {
        Runs = runs;
        Extrapolation = ChiExtrapolation.Of([.. runs.Select(static r => new ChiPoint(r.Folder.Inputs.BondDimension, r.Summary.LogZPerSite, r.Summary.Measure))]);
        Table = MakeTable();
    }

    public ImmutableArray<RunReport> Runs { get; }

    public ChiExtrapolation Extrapolation { get; }

    public DataTable Table { get; }

    public ParameterSet Parameters => Runs[0].Parameters;

    public ExactValue? Exact => Runs[0].Summary.Exact;

    /// <summary>(extrapolated - exact) / |exact|, or NaN.</summary>
    public double RelativeDeviation => Exact is null ? double.NaN : (Extrapolation.Value.Value - Exact.Value) / Math.Abs(Exact.Value);

    /// <summary>Deviations from the exact value against chi, or, where none is known, changes from one chi to the next.</summary>
    public Figure Figure()
    {
        string caption = FormattableString.Invariant($"{ModelLine.Of(Parameters)}; {Runs[0].Scheme.Name}, {Runs[0].Folder.Inputs.Steps} steps");
        double scale = Math.Abs(Extrapolation.Value.Value);
        double? bar = Extrapolation.IsExtrapolated ? Extrapolation.Value.Error / scale : null;
        var bars = new DataSeries("error bar of each run", [.. Runs.Select(r => new DataPoint(r.Folder.Inputs.BondDimension, r.Summary.LogZPerSite.Error / scale))]);
        if (Exact is not null)
        {
            var deviations = new DataSeries("deviation from the exact value", [.. Runs.Select(static r => new DataPoint(r.Folder.Inputs.BondDimension, Math.Abs(r.Summary.RelativeDeviation)))]);
            return ConvergencePlot.Create([deviations, bars], caption, extrapolationError: bar);
        }

        var changes = new DataSeries("change from the bond dimension before", [.. Enumerable.Range(1, Runs.Length - 1).Select(i => new DataPoint(Runs[i].Folder.Inputs.BondDimension, Math.Abs(Change(i)) / scale))]);
        return ConvergencePlot.Create([changes, bars], caption, yLabel: "|relative change| of ln Z per site", extrapolationError: bar);
    }

    private DataTable MakeTable()
    {
        var table = new DataTable(
            new TableColumn("bondDimension", ColumnKind.WholeNumber) { Title = "chi" },
            new TableColumn("logZPerSite") { Title = "ln Z per site", ErrorColumn = "logZPerSiteError" },
            new TableColumn("logZPerSiteError") { Title = "error", Style = NumberStyle.Scientific },
            new TableColumn("change") { Style = NumberStyle.Scientific },
            new TableColumn("largestDiscardedWeight") { Title = "discarded", Style = NumberStyle.Scientific },
            new TableColumn("discardedMeasure") { Title = "D", Style = NumberStyle.Scientific },
            new TableColumn("relativeDeviation") { Title = "relative deviation", Style = NumberStyle.Scientific },
            new TableColumn("seconds") { Title = "time", Unit = "s", Style = NumberStyle.Duration });
        for (int i = 0; i < Runs.Length; i++)
        {
            RunReport run = Runs[i];
            table.AddRow(
                run.Folder.Inputs.BondDimension,
                run.Summary.LogZPerSite.Value,
                run.Summary.LogZPerSite.Error,
                i == 0 ? null : Change(i),
                run.Records.Max(static r => r.DiscardedWeight),
                run.Summary.Measure,
                run.Summary.Exact is null ? null : run.Summary.RelativeDeviation,
                run.StepSeconds);
        }

        return table;
    }

    private double Change(int i) => Runs[i].Summary.LogZPerSite.Value - Runs[i - 1].Summary.LogZPerSite.Value;
}
