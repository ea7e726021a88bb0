namespace TensorRG.Models.Tests;

/// <summary>
/// Partition functions of small tori as plain sums over configurations, written from the Hamiltonians (or vertex weights)
/// and from nothing else. Every site owns the bond to its right and the bond below it, so lengths 1 and 2 double bonds.
/// </summary>
internal static class Configurations
{
    /// <summary>ln Z and the mean energy of a torus.</summary>
    public static (double LogZ, double Energy) Sum(ParameterSet parameters, int lx, int ly) => parameters.Model.Name switch
    {
        "ising" => Spins(2, lx, ly, parameters.Temperature, IsingBond(parameters), Field(parameters["h"])),
        "potts" => Spins(parameters.WholeNumber("q"), lx, ly, parameters.Temperature, PottsBond(parameters), _ => 0),
        "clock" => Spins(parameters.WholeNumber("q"), lx, ly, parameters.Temperature, ClockBond(parameters), _ => 0),
        "six-vertex" => (Arrows(lx, ly, parameters["a"], parameters["b"], parameters["c"]), double.NaN),
        _ => throw new NotSupportedException($"No independent sum over configurations is written for model '{parameters.Model.Name}'; add one here."),
    };

    private static int Sign(int s) => s == 0 ? 1 : -1;

    private static Func<int, double> Field(double h) => s => -h * Sign(s);

    private static Func<int, int, bool, double> IsingBond(ParameterSet p)
    {
        double jx = p["Jx"], jy = p["Jy"];
        return (s, t, horizontal) => -(horizontal ? jx : jy) * Sign(s) * Sign(t);
    }

    private static Func<int, int, bool, double> PottsBond(ParameterSet p)
    {
        double j = p["J"];
        return (s, t, _) => s == t ? -j : 0;
    }

    private static Func<int, int, bool, double> ClockBond(ParameterSet p)
    {
        double j = p["J"], q = p["q"];
        return (s, t, _) => -j * Math.Cos(2 * Math.PI * (s - t) / q);
    }

    private static (double LogZ, double Energy) Spins(
        int q, int lx, int ly, double t, Func<int, int, bool, double> bond, Func<int, double> site)
    {
        double[] energies = [.. Enumerate(q, lx * ly).Select(s => Energy(s, lx, ly, bond, site))];
        double lowest = energies.Min();
        double sum = Total(energies.Select(e => Math.Exp((lowest - e) / t)));
        double above = Total(energies.Select(e => Math.Exp((lowest - e) / t) * (e - lowest)));
        return (Math.Log(sum) - (lowest / t), lowest + (above / sum));
    }

    // Compensated (Kahan): a plain sum of many thousand terms would be the least accurate number of the comparison.
    private static double Total(IEnumerable<double> terms)
    {
        double sum = 0, lost = 0;
        foreach (double term in terms)
        {
            double corrected = term - lost, next = sum + corrected;
            lost = next - sum - corrected;
            sum = next;
        }
        return sum;
    }

    private static double Energy(int[] s, int lx, int ly, Func<int, int, bool, double> bond, Func<int, double> site)
    {
        double e = 0;
        for (int y = 0; y < ly; y++)
        {
            for (int x = 0; x < lx; x++)
            {
                int here = s[(y * lx) + x];
                e += bond(here, s[(y * lx) + ((x + 1) % lx)], true) + bond(here, s[((y + 1) % ly * lx) + x], false) + site(here);
            }
        }
        return e;
    }

    // Arrow on each bond: 1 is right or down. Bond 2i runs right of site i, bond 2i + 1 below it.
    private static double Arrows(int lx, int ly, double a, double b, double c)
    {
        return Math.Log(Total(Enumerate(2, 2 * lx * ly).Select(Weight)));

        double Weight(int[] arrow)
        {
            double weight = 1;
            for (int y = 0; y < ly && weight != 0; y++)
            {
                for (int x = 0; x < lx && weight != 0; x++)
                {
                    int west = arrow[2 * ((y * lx) + ((x + lx - 1) % lx))], east = arrow[2 * ((y * lx) + x)];
                    int north = arrow[(2 * (((y + ly - 1) % ly * lx) + x)) + 1], south = arrow[(2 * ((y * lx) + x)) + 1];
                    weight *= Vertex(west, east, north, south, a, b, c);
                }
            }
            return weight;
        }
    }

    private static double Vertex(int west, int east, int north, int south, double a, double b, double c)
    {
        // A right or down arrow enters from the west or north and leaves to the east or south.
        int entering = west + north + (1 - east) + (1 - south);
        if (entering != 2)
            return 0;
        if (west != east)
            return c;
        return west == north ? a : b;
    }

    // The same array every time.
    private static IEnumerable<int[]> Enumerate(int q, int n)
    {
        var s = new int[n];
        while (true)
        {
            yield return s;
            int i = 0;
            while (i < n && ++s[i] == q)
                s[i++] = 0;
            if (i == n)
                yield break;
        }
    }
}
