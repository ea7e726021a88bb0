namespace TensorRG.Models.Solutions;

/// <summary>A sum that carries its rounding error along (A. Neumaier, Z. Angew. Math. Mech. 54, 39, 1974).</summary>
internal struct CompensatedSum
{
    private double sum;
    private double rest;

    /// <summary>The sum so far.</summary>
    public readonly double Total => sum + rest;

    /// <summary>Adds a term.</summary>
    public void Add(double term)
    {
        double next = sum + term;
        rest += Math.Abs(sum) >= Math.Abs(term) ? sum - next + term : term - next + sum;
        sum = next;
    }
}
