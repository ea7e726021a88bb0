namespace TensorRG.Reports;

/// <summary>One column of a <see cref="DataTable"/>.</summary>
/// <param name="Name">camelCase name: the key in JSON, the heading in CSV.</param>
/// <param name="Kind">Type of the cells.</param>
public sealed record TableColumn(string Name, ColumnKind Kind = ColumnKind.Number)
{
    /// <summary>Unit or "per what", such as "s" or "per site"; empty for a pure number.</summary>
    public string Unit { get; init; } = "";

    /// <summary>Heading on screen; the name where none is given.</summary>
    public string Title { get; init; } = Name;

    /// <summary>How numbers read on screen.</summary>
    public NumberStyle Style { get; init; }

    /// <summary>Name of the column with this column's error bar, which the screen text then includes; null for none.</summary>
    public string? ErrorColumn { get; init; }

    /// <summary>The screen heading with the unit, "time [s]".</summary>
    public string Heading => WithUnit(Title);

    /// <summary>The CSV heading with the unit, "seconds [s]".</summary>
    public string CsvHeading => WithUnit(Name);

    private string WithUnit(string text) => Unit.Length == 0 ? text : $"{text} [{Unit}]";
}
