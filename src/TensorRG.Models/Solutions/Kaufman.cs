using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// The square Ising model without a field on a finite torus (B. Kaufman, Phys. Rev. 76, 1232, 1949).
/// A direction of length 2 has two bonds between the same two spins, one of length 1 a bond from a spin to itself: each
/// site always owns one bond in each direction, 2 Lx Ly bonds in all, as in a contraction of Lx Ly vertex tensors.
/// </summary>
public static class Kaufman
{
    /// <summary>
    /// ln Z / (Lx Ly). Z = 1/2 (C_odd + S_odd + C_even + sgn(T_c - T) S_even), products over the momenta w = pi r / Lx of
    /// 2 cosh and 2 sinh of Ly gamma(w) / 2; evaluated from logarithms, so no size overflows.
    /// </summary>
    /// <param name="lx">Columns, at least 1.</param>
    /// <param name="ly">Rows, at least 1.</param>
    /// <param name="temperature">T > 0.</param>
    /// <param name="jx">Horizontal coupling; a negative one needs an even number of columns.</param>
    /// <param name="jy">Vertical coupling; a negative one needs an even number of rows.</param>
    /// <exception cref="ArgumentOutOfRangeException">A size below 1, or a temperature that is not positive.</exception>
    /// <exception cref="ModelException">A negative coupling along an odd length, which frustrates the torus.</exception>
    public static double LogZPerSite(int lx, int ly, double temperature, double jx = 1, double jy = 1)
    {
        Check(lx, ly, temperature, jx, jy);
        IsingCouplings couplings = new(temperature, jx, jy);
        (double mean, double cosh, double sinh) odd = Sector(couplings, lx, ly, 1);
        (double mean, double cosh, double sinh) even = Sector(couplings, lx, ly, 0);
        double sign = Math.Sign(couplings.ScaledDistance);
        // Sum of logarithms of a sector, relative to the odd one, times the rows.
        double relative = (even.mean - odd.mean) * lx * ly / 2;
        double sum = odd.cosh + odd.sinh + (Math.Exp(relative) * (even.cosh + (sign * even.sinh)));
        return couplings.Sum + (odd.mean / 2) + (Math.Log(sum / 2) / ((double)lx * ly));
    }

    // Mean of the modes' logarithms, and the products of 1 + exp(-Ly gamma) and 1 - exp(-Ly gamma), over r = first, first + 2, ...
    private static (double Mean, double Cosh, double Sinh) Sector(IsingCouplings couplings, int lx, int ly, int first)
    {
        CompensatedSum logs = default, cosh = default, sinh = default;
        for (int r = first; r < 2 * lx; r += 2)
        {
            double sine = Math.Sin(Math.PI * Math.Min(r, (2 * lx) - r) / (2.0 * lx));
            double oneMinusCosine = 2 * sine * sine;
            logs.Add(couplings.LogMode(oneMinusCosine).Value);
            double decay = ly * couplings.Gamma(oneMinusCosine);
            cosh.Add(Elementary.Log1P(Math.Exp(-decay)));
            sinh.Add(Math.Log(-Elementary.ExpM1(-decay)));
        }
        return (logs.Value / lx, Math.Exp(cosh.Value), Math.Exp(sinh.Value));
    }

    private static void Check(int lx, int ly, double temperature, double jx, double jy)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(lx, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(ly, 1);
        if (!(temperature > 0 && double.IsFinite(temperature)))
            throw new ArgumentOutOfRangeException(nameof(temperature), "The temperature must be a positive number.");
        if ((jx < 0 && lx % 2 == 1) || (jy < 0 && ly % 2 == 1))
            throw new ModelException("A negative coupling along an odd length frustrates the torus, which this formula does not cover. Take an even length in that direction.");
    }
}
