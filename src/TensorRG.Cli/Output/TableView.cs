using Spectre.Console;
using TensorRG.Reports;

namespace TensorRG.Cli.Output;

/// <summary>A data table on the terminal.</summary>
internal static class TableView
{
    public static void Write(IAnsiConsole console, DataTable data)
    {
        var table = new Table().Border(TableBorder.Simple);
        int[] shown = [.. Enumerable.Range(0, data.Columns.Length).Where(c => HasCells(data, c))];
        foreach (int column in shown)
            table.AddColumn(Heading(data.Columns[column]));
        for (int row = 0; row < data.RowCount; row++)
            table.AddRow([.. shown.Select(column => new Text(data.ScreenText(row, column)))]);
        console.Write(table);
    }

    private static bool HasCells(DataTable data, int column)
        => Enumerable.Range(0, data.RowCount).Any(row => data[row, column] is not null);

    /// <summary>Text to the left, numbers to the right; times without their unit, which the cells carry.</summary>
    private static Spectre.Console.TableColumn Heading(Reports.TableColumn column)
    {
        string title = column.Style == NumberStyle.Duration ? column.Title : column.Heading;
        var result = new Spectre.Console.TableColumn(new Text(title));
        return column.Kind == ColumnKind.Text ? result : result.NoWrap().RightAligned();
    }
}
