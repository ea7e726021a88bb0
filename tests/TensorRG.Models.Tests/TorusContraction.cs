namespace TensorRG.Models.Tests;

/// <summary>Contracts the vertex tensors of a small torus by plain loops over a row-to-row transfer matrix.</summary>
internal static class TorusContraction
{
    /// <summary>The contraction, and that of the absolute values: the scale of its rounding error.</summary>
    public static (double Value, double Scale) Contract(VertexNetwork network, int lx, int ly)
    {
        double value = Trace(network.RealElement, network, lx, ly);
        double scale = Trace((u, l, d, r) => Math.Abs(network.RealElement(u, l, d, r)), network, lx, ly);
        return (value, scale);
    }

    /// <summary>The row-to-row transfer matrix: element [upper, lower] of rows numbered in base D, leftmost column first.</summary>
    public static double[,] RowMatrix(Func<int, int, int, int, double> element, int vertical, int horizontal, int lx)
    {
        int size = (int)Math.Pow(vertical, lx);
        var matrix = new double[size, size];
        for (int upper = 0; upper < size; upper++)
        {
            for (int lower = 0; lower < size; lower++)
                matrix[upper, lower] = RowElement(element, vertical, horizontal, lx, upper, lower);
        }
        return matrix;
    }

    private static double RowElement(Func<int, int, int, int, double> element, int vertical, int horizontal, int lx, int upper, int lower)
    {
        double sum = 0;
        for (int start = 0; start < horizontal; start++)
        {
            var line = new double[horizontal];
            line[start] = 1;
            for ((int column, int u, int d) = (0, upper, lower); column < lx; column++, u /= vertical, d /= vertical)
                line = Next(element, line, u % vertical, d % vertical);
            sum += line[start];
        }
        return sum;
    }

    private static double[] Next(Func<int, int, int, int, double> element, double[] line, int u, int d)
    {
        var next = new double[line.Length];
        for (int l = 0; l < line.Length; l++)
        {
            for (int r = 0; r < line.Length && line[l] != 0; r++)
                next[r] += line[l] * element(u, l, d, r);
        }
        return next;
    }

    private static double Trace(Func<int, int, int, int, double> element, VertexNetwork network, int lx, int ly)
    {
        double[,] row = RowMatrix(element, network.VerticalBond.Length, network.HorizontalBond.Length, lx);
        int size = row.GetLength(0);
        double trace = 0;
        for (int start = 0; start < size; start++)
        {
            var vector = new double[size];
            vector[start] = 1;
            for (int y = 0; y < ly; y++)
                vector = Multiply(vector, row);
            trace += vector[start];
        }
        return trace;
    }

    private static double[] Multiply(double[] vector, double[,] matrix)
    {
        var result = new double[vector.Length];
        for (int i = 0; i < vector.Length; i++)
        {
            for (int j = 0; j < vector.Length && vector[i] != 0; j++)
                result[j] += vector[i] * matrix[i, j];
        }
        return result;
    }
}
