namespace TensorRG.Models.Solutions;

/// <summary>The temperature where a distance from criticality changes its sign.</summary>
internal static class CriticalRoot
{
    /// <summary>Bisection in ln T, then one step of Newton's method.</summary>
    /// <param name="distance">Positive in the ordered phase, at low temperature; its derivative is beta d/dbeta.</param>
    /// <param name="scale">A temperature of the right order of magnitude.</param>
    public static double Solve(Func<double, Jet> distance, double scale)
    {
        double low = scale, high = scale;
        while (distance(low).Value < 0)
            low /= 2;
        while (distance(high).Value > 0)
            high *= 2;
        for (int i = 0; i < 100 && high - low > 4 * Constants.Epsilon * high; i++)
        {
            double middle = low + ((high - low) / 2);
            if (distance(middle).Value > 0)
                low = middle;
            else
                high = middle;
        }
        double t = low + ((high - low) / 2);
        Jet g = distance(t);
        return t + (t * g.Value / g.First);
    }
}
