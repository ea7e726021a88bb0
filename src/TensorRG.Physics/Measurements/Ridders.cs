namespace TensorRG.Physics.Measurements;

/// <summary>
/// Derivative of a smooth function by central differences extrapolated to zero step (C. J. F. Ridders, Adv. Eng. Softw. 4, 75 (1982)).
/// </summary>
internal static class Ridders
{
    private const int Levels = 5;

    /// <summary>Relative error that is good enough.</summary>
    private const double GoodEnough = 1e-11;

    /// <summary>f'(0) and an estimate of its error.</summary>
    /// <param name="function">The function.</param>
    /// <param name="step">The first step; each further one is half the one before.</param>
    public static (double Value, double Error) Derivative(Func<double, double> function, double step)
    {
        var table = new List<double[]>();
        (double Value, double Error) best = (double.NaN, double.PositiveInfinity);
        for (int level = 0; level < Levels; level++, step /= 2)
        {
            var row = new double[level + 1];
            row[0] = (function(step) - function(-step)) / (2 * step);
            for (int order = 1; order <= level; order++)
            {
                row[order] = row[order - 1] + ((row[order - 1] - table[^1][order - 1]) / (Math.Pow(4, order) - 1));
                double error = Math.Max(Math.Abs(row[order] - row[order - 1]), Math.Abs(row[order] - table[^1][order - 1]));
                if (error <= best.Error)
                    best = (row[order], error);
            }

            table.Add(row);
            if (best.Error <= GoodEnough * Math.Abs(best.Value) || (level > 1 && Math.Abs(row[^1] - table[^2][^1]) >= 2 * best.Error))
                break;
        }

        return best;
    }
}
