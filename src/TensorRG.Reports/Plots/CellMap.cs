using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>A quantity over a grid of two parameters, drawn in colours.</summary>
/// <param name="Label">Quantity and unit: the text of the colour bar.</param>
/// <param name="X">Ascending abscissas of the columns, all different; at least one.</param>
/// <param name="Y">Ascending ordinates of the rows, all different; at least one.</param>
/// <param name="Values">A value for each cell, row after row from the first ordinate on; NaN or an infinity for none.</param>
public sealed record CellMap(string Label, ImmutableArray<double> X, ImmutableArray<double> Y, ImmutableArray<double> Values)
{
    /// <summary>Places of cells that carry a cross, such as those that did not converge; empty for none.</summary>
    public ImmutableArray<int> Marked { get; init; } = [];

    /// <summary>The value of a cell.</summary>
    /// <param name="column">Column, from 0.</param>
    /// <param name="row">Row, from 0.</param>
    public double this[int column, int row] => Values[row * X.Length + column];
}
