namespace TensorRG.Models.Solutions;

/// <summary>
/// A value with its first and second derivative in one variable, carried along by the chain rule: derivatives of a formula
/// without differences.
/// </summary>
/// <param name="Value">f.</param>
/// <param name="First">f'.</param>
/// <param name="Second">f''.</param>
internal readonly record struct Jet(double Value, double First, double Second)
{
    public static implicit operator Jet(double constant) => new(constant, 0, 0);

    public static Jet operator +(Jet a, Jet b) => new(a.Value + b.Value, a.First + b.First, a.Second + b.Second);

    public static Jet operator -(Jet a, Jet b) => new(a.Value - b.Value, a.First - b.First, a.Second - b.Second);

    public static Jet operator *(Jet a, Jet b) => new(
        a.Value * b.Value,
        (a.First * b.Value) + (a.Value * b.First),
        (a.Second * b.Value) + (2 * a.First * b.First) + (a.Value * b.Second));

    public static Jet operator /(Jet a, Jet b)
    {
        double inverse = 1 / b.Value;
        double value = a.Value * inverse;
        double first = (a.First - (value * b.First)) * inverse;
        return new Jet(value, first, (a.Second - (2 * first * b.First) - (value * b.Second)) * inverse);
    }

    /// <summary>exp(-x).</summary>
    public static Jet ExpMinus(Jet x) => Compose(Math.Exp(-x.Value), -Math.Exp(-x.Value), Math.Exp(-x.Value), x);

    /// <summary>1 - exp(-x), accurate for small x.</summary>
    public static Jet OneMinusExpMinus(Jet x)
        => Compose(-Elementary.ExpM1(-x.Value), Math.Exp(-x.Value), -Math.Exp(-x.Value), x);

    /// <summary>The positive square root.</summary>
    public static Jet Sqrt(Jet x)
    {
        double root = Math.Sqrt(x.Value);
        double first = x.First / (2 * root);
        return new Jet(root, first, (x.Second - (2 * first * first)) / (2 * root));
    }

    /// <summary>The natural logarithm.</summary>
    public static Jet Log(Jet x)
    {
        double first = x.First / x.Value;
        return new Jet(Math.Log(x.Value), first, (x.Second / x.Value) - (first * first));
    }

    private static Jet Compose(double f, double df, double ddf, Jet x)
        => new(f, df * x.First, (ddf * x.First * x.First) + (df * x.Second));
}
