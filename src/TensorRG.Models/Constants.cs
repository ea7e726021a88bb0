namespace TensorRG.Models;

/// <summary>Numbers that recur.</summary>
internal static class Constants
{
    /// <summary>ln 2.</summary>
    public const double Ln2 = 0.693147180559945309417232121458;

    /// <summary>ln(1 + sqrt 2) = 2 K_c of the square Ising model.</summary>
    public const double LogSilver = 0.881373587019543025232609324980;

    /// <summary>Rounding unit: distance from 1 to the next double.</summary>
    public const double Epsilon = 2.220446049250313e-16;
}
