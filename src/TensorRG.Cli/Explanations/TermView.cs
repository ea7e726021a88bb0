using System.Collections.Immutable;
using System.Numerics;

namespace TensorRG.Cli.Explanations;

/// <summary>A table of local energies or weights.</summary>
/// <param name="Where">The clusters on which it counts, in words.</param>
/// <param name="Kind">What its values are.</param>
/// <param name="Variables">Names of the places in a cluster.</param>
/// <param name="Values">A value for each configuration, the state of the last place fastest; null where it is excluded.</param>
internal sealed record TermView(string Where, TermKind Kind, ImmutableArray<string> Variables, ImmutableArray<Complex?> Values)
{
    private const double Resolution = 1e-10;

    /// <summary>Configurations that are excluded.</summary>
    public int Excluded => Values.Count(static v => v is null);

    /// <summary>The values of configurations that are not excluded.</summary>
    public IEnumerable<Complex> Allowed => Values.OfType<Complex>();

    /// <summary>True if no value has an imaginary part.</summary>
    public bool IsReal => Allowed.All(static v => v.Imaginary == 0);

    /// <summary>True if it leaves every configuration as it is: energy 0, or weight 1.</summary>
    public bool IsIdle => Excluded == 0 && Allowed.All(v => v == (Kind == TermKind.Energy ? 0 : 1));

    /// <summary>Smallest and largest value, or magnitude where values are complex.</summary>
    public (double Least, double Most) Range
    {
        get
        {
            double[] sizes = [.. Allowed.Select(v => IsReal ? v.Real : Complex.Abs(v))];
            return (sizes.Min(), sizes.Max());
        }
    }

    /// <summary>Number of values that differ by more than round-off.</summary>
    public int Distinct
    {
        get
        {
            double unit = Resolution * Math.Max(Allowed.Max(static v => Complex.Abs(v)), double.Epsilon / Resolution);
            return Allowed.Select(v => (Math.Round(v.Real / unit), Math.Round(v.Imaginary / unit))).Distinct().Count();
        }
    }
}
