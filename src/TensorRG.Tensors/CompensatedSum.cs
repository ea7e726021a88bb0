namespace TensorRG.Tensors;

/// <summary>
/// A running sum with the rounding error carried along (A. Neumaier, ZAMM 54, 39 (1974)): the result is right to about
/// one unit in the last place, whatever the order and the cancellation.
/// </summary>
public struct CompensatedSum : IEquatable<CompensatedSum>
{
    /// <summary>A sum in a saved state.</summary>
    /// <param name="high">The rounded sum.</param>
    /// <param name="low">The rounding errors collected so far.</param>
    public CompensatedSum(double high, double low)
    {
        High = high;
        Low = low;
    }

    /// <summary>The rounded sum.</summary>
    public double High { get; private set; }

    /// <summary>The rounding errors collected so far.</summary>
    public double Low { get; private set; }

    /// <summary>The sum.</summary>
    public readonly double Value => High + Low;

    /// <summary>Whether two sums are in the same state.</summary>
    /// <param name="left">A sum.</param>
    /// <param name="right">Another.</param>
    public static bool operator ==(CompensatedSum left, CompensatedSum right) => left.Equals(right);

    /// <summary>Whether two sums are in different states.</summary>
    /// <param name="left">A sum.</param>
    /// <param name="right">Another.</param>
    public static bool operator !=(CompensatedSum left, CompensatedSum right) => !left.Equals(right);

    /// <summary>Adds a term.</summary>
    /// <param name="term">Any number; an infinite one makes the sum infinite.</param>
    public void Add(double term)
    {
        double sum = High + term;
        if (double.IsFinite(sum)) // The error of an infinite sum would be infinity minus infinity.
            Low += Math.Abs(High) >= Math.Abs(term) ? (High - sum) + term : (term - sum) + High;
        High = sum;
    }

    /// <inheritdoc/>
    public readonly bool Equals(CompensatedSum other) => High.Equals(other.High) && Low.Equals(other.Low);

    /// <inheritdoc/>
    public override readonly bool Equals(object? obj) => obj is CompensatedSum other && Equals(other);

    /// <inheritdoc/>
    public override readonly int GetHashCode() => HashCode.Combine(High, Low);
}
