using System.Collections.Immutable;
using System.Globalization;
using System.Text.Json.Nodes;

namespace TensorRG.Reports;

/// <summary>
/// The one table every command fills: typed columns, rows in the order added, and from it the screen text, CSV and
/// JSON. Everything is culture-invariant; the same rows give the same bytes.
/// </summary>
public sealed class DataTable
{
    private readonly List<ImmutableArray<object?>> _rows = [];

    /// <summary>An empty table.</summary>
    /// <param name="columns">At least one column; names and error columns are checked.</param>
    /// <exception cref="ArgumentException">No column, two of the same name, or an error column that is no number column of the table.</exception>
    public DataTable(params ImmutableArray<TableColumn> columns)
    {
        if (columns.IsDefaultOrEmpty) throw new ArgumentException("A table needs at least one column.", nameof(columns));
        Columns = columns;
        foreach (var column in columns) Check(column);
    }

    /// <summary>The columns, left to right.</summary>
    public ImmutableArray<TableColumn> Columns { get; }

    /// <summary>Number of rows.</summary>
    public int RowCount => _rows.Count;

    /// <summary>Appends a row: a double, an integer, a string or a bool per column as its kind says, or null for "not known".</summary>
    /// <param name="cells">One cell per column.</param>
    /// <returns>This table.</returns>
    /// <exception cref="ArgumentException">The number of cells, or the type of one, does not fit the columns.</exception>
    public DataTable AddRow(params ReadOnlySpan<object?> cells)
    {
        if (cells.Length != Columns.Length)
            throw new ArgumentException($"{cells.Length} cells for {Columns.Length} columns.", nameof(cells));
        var row = ImmutableArray.CreateBuilder<object?>(cells.Length);
        for (var i = 0; i < cells.Length; i++) row.Add(Typed(Columns[i], cells[i]));
        _rows.Add(row.MoveToImmutable());
        return this;
    }

    /// <summary>A cell as stored: double, long, string, bool or null.</summary>
    /// <param name="row">Row, from 0.</param>
    /// <param name="column">Column, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row or column.</exception>
    public object? this[int row, int column]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfNegative(column);
            ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(column, Columns.Length);
            return _rows[row][column];
        }
    }

    /// <summary>A cell as the screen shows it: in the column's style, with its error bar; empty where nothing is known.</summary>
    /// <param name="row">Row, from 0.</param>
    /// <param name="column">Column, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row or column.</exception>
    public string ScreenText(int row, int column) => this[row, column] switch
    {
        null => "",
        double value => Styled(row, Columns[column], value),
        long value when Columns[column].Style == NumberStyle.Plain => value.ToString(CultureInfo.InvariantCulture),
        long value => Styled(row, Columns[column], value),
        bool value => value ? "yes" : "no",
        var text => (string)text,
    };

    /// <summary>
    /// CSV after RFC 4180: a heading row, comma, CRLF, quotes where needed and around an empty string, nothing for a
    /// cell that is not known. Doubles round-trip; NaN and infinities are NaN, Infinity, -Infinity.
    /// </summary>
    /// <param name="withUnits">Whether headings carry their unit, "seconds [s]"; without, they are the bare names.</param>
    public string ToCsv(bool withUnits = true)
    {
        var lines = new List<IEnumerable<string>> { Columns.Select(c => Csv.Quote(withUnits ? c.CsvHeading : c.Name)) };
        lines.AddRange(_rows.Select(row => row.Select(Csv.Cell)));
        return string.Concat(lines.Select(cells => string.Join(',', cells) + "\r\n"));
    }

    /// <summary>An array with one object a row, keyed by column name in column order; see <see cref="JsonText"/> for the numbers.</summary>
    public JsonArray ToJson() => new([.. _rows.Select(JsonRow)]);

    private JsonObject JsonRow(ImmutableArray<object?> row)
    {
        var result = new JsonObject();
        for (var i = 0; i < row.Length; i++) result.Add(Columns[i].Name, JsonCell(row[i]));
        return result;
    }

    private static JsonNode? JsonCell(object? cell) => cell switch
    {
        double value => JsonText.Number(value),
        long value => JsonValue.Create(value),
        bool value => JsonValue.Create(value),
        string value => JsonValue.Create(value),
        _ => null,
    };

    private string Styled(int row, TableColumn column, double value) => column switch
    {
        { Style: NumberStyle.Scientific } => NumberFormat.Scientific(value),
        { Style: NumberStyle.Duration } => NumberFormat.Duration(value),
        { Style: NumberStyle.Count } => NumberFormat.Count(value),
        { ErrorColumn: { } name } => NumberFormat.WithError(value, (double?)_rows[row][IndexOf(name)] ?? double.NaN),
        _ => NumberFormat.RoundTrip(value),
    };

    private int IndexOf(string name)
    {
        for (var i = 0; i < Columns.Length; i++)
        {
            if (Columns[i].Name == name) return i;
        }
        return -1;
    }

    private void Check(TableColumn column)
    {
        if (Columns.Count(c => c.Name == column.Name) > 1)
            throw new ArgumentException($"Two columns are named '{column.Name}'.");
        if (column.ErrorColumn is { } error && (IndexOf(error) < 0 || Columns[IndexOf(error)].Kind != ColumnKind.Number))
            throw new ArgumentException($"The error column '{error}' of '{column.Name}' is no number column of the table.");
    }

    private static object? Typed(TableColumn column, object? cell) => (column.Kind, cell) switch
    {
        (_, null) => null,
        (ColumnKind.Number, double value) => value,
        (ColumnKind.WholeNumber, int value) => (long)value,
        (ColumnKind.WholeNumber, long value) => value,
        (ColumnKind.Text, string value) => value,
        (ColumnKind.Flag, bool value) => value,
        _ => throw new ArgumentException($"Column '{column.Name}' holds {column.Kind}, not {cell.GetType().Name}."),
    };
}
