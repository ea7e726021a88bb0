using System.Globalization;

namespace TensorRG.Tensors;

/// <summary>
/// A conserved charge: up to four integers, one for each factor of an <see cref="AbelianGroup"/>. Unused components
/// are zero. Arithmetic belongs to the group, which knows the moduli.
/// </summary>
/// <param name="First">Component of the first factor.</param>
/// <param name="Second">Component of the second factor.</param>
/// <param name="Third">Component of the third factor.</param>
/// <param name="Fourth">Component of the fourth factor.</param>
public readonly record struct Charge(int First, int Second = 0, int Third = 0, int Fourth = 0) : IComparable<Charge>
{
    /// <summary>The neutral charge of every group.</summary>
    public static Charge Zero => default;

    /// <summary>Component number <paramref name="factor"/>, from 0 to 3.</summary>
    /// <param name="factor">Index of the group factor.</param>
    public int this[int factor] => factor switch
    {
        0 => First,
        1 => Second,
        2 => Third,
        3 => Fourth,
        _ => throw new ArgumentOutOfRangeException(nameof(factor)),
    };

    /// <summary>Whether the first charge sorts before the second.</summary>
    /// <param name="left">A charge.</param>
    /// <param name="right">Another.</param>
    public static bool operator <(Charge left, Charge right) => left.CompareTo(right) < 0;

    /// <summary>Whether the first charge sorts after the second.</summary>
    /// <param name="left">A charge.</param>
    /// <param name="right">Another.</param>
    public static bool operator >(Charge left, Charge right) => left.CompareTo(right) > 0;

    /// <summary>Whether the first charge sorts before the second or equals it.</summary>
    /// <param name="left">A charge.</param>
    /// <param name="right">Another.</param>
    public static bool operator <=(Charge left, Charge right) => left.CompareTo(right) <= 0;

    /// <summary>Whether the first charge sorts after the second or equals it.</summary>
    /// <param name="left">A charge.</param>
    /// <param name="right">Another.</param>
    public static bool operator >=(Charge left, Charge right) => left.CompareTo(right) >= 0;

    /// <summary>Lexicographic order of the components.</summary>
    /// <param name="other">Another charge.</param>
    public int CompareTo(Charge other)
    {
        int order = First.CompareTo(other.First);
        if (order == 0)
            order = Second.CompareTo(other.Second);
        if (order == 0)
            order = Third.CompareTo(other.Third);
        return order != 0 ? order : Fourth.CompareTo(other.Fourth);
    }

    /// <summary>The first components as text: <c>2</c> for one factor, <c>(2,-1)</c> for two.</summary>
    /// <param name="factors">How many components to show; 0 shows <c>0</c>.</param>
    public string ToText(int factors)
    {
        if (factors <= 1)
            return First.ToString(CultureInfo.InvariantCulture);
        Charge self = this;
        return "(" + string.Join(',', Enumerable.Range(0, factors).Select(f => self[f].ToString(CultureInfo.InvariantCulture))) + ")";
    }
}
