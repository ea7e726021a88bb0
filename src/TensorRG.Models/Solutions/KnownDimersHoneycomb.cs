namespace TensorRG.Models.Solutions;

/// <summary>
/// Close-packed dimers on the honeycomb lattice, activities x1, x2, x3 of the three directions (P. W. Kasteleyn, J. Math. Phys. 4, 287, 1963).
/// Where the activities are the sides of a triangle with opposite angles t_i, t_i/(2 pi) dimers per site lie in direction i and the entropy per site is
/// (1/2 pi) sum Lambda(t_i), Lambda(t) = -int_0^t ln(2 sin s) ds; otherwise all dimers lie in the direction of the largest activity.
/// </summary>
internal sealed class KnownDimersHoneycomb : KnownSolution
{
    private const string Source = "P. W. Kasteleyn, J. Math. Phys. 4, 287 (1963)";

    /// <inheritdoc/>
    public override string Name => "dimers-honeycomb";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "any x1, x2, x3", Source),
        new(Quantity.EntropyPerSite, "any x1, x2, x3", Source),
        new("direction-1", "any x1, x2, x3: dimers per site in direction 1", Source),
        new("direction-2", "any x1, x2, x3: dimers per site in direction 2", Source),
        new("direction-3", "any x1, x2, x3: dimers per site in direction 3", Source),
    ];

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        double[] x = [parameters["x1"], parameters["x2"], parameters["x3"]];
        if (!x.All(v => v > 0))
            return null;
        double[] angle = [Angle(x[0], x[1], x[2]), Angle(x[1], x[2], x[0]), Angle(x[2], x[0], x[1])];
        double entropy = angle.Sum(Lobachevsky) / (2 * Math.PI);
        return quantity switch
        {
            "ln-z" => Value(entropy + (angle.Zip(x, (a, v) => a * Math.Log(v)).Sum() / (2 * Math.PI)), "entropy and the mean logarithm of the weight"),
            "entropy" => Value(entropy, "(1/2 pi) sum of Lobachevsky's function of the angles, by its series"),
            "direction-1" => Value(angle[0] / (2 * Math.PI), "angle opposite to x1 over 2 pi"),
            "direction-2" => Value(angle[1] / (2 * Math.PI), "angle opposite to x2 over 2 pi"),
            "direction-3" => Value(angle[2] / (2 * Math.PI), "angle opposite to x3 over 2 pi"),
            _ => null,
        };
    }

    // Opposite to a; tan(angle/2)^2 = (a + b - c)(a - b + c) / ((b + c - a)(a + b + c)).
    private static double Angle(double a, double b, double c)
    {
        double above = Math.Max(0, a + b - c) * Math.Max(0, a - b + c), below = Math.Max(0, b + c - a) * (a + b + c);
        return 2 * Math.Atan2(Math.Sqrt(above), Math.Sqrt(below));
    }

    // Lambda(t) = t (1 - ln(2t) + sum_n zeta(2n) (t/pi)^2n / (n (2n + 1))), and Lambda(pi - t) = -Lambda(t).
    private static double Lobachevsky(double angle)
    {
        if (angle > Math.PI / 2)
            return -Lobachevsky(Math.PI - angle);
        if (angle <= 0)
            return 0;
        double square = angle / Math.PI * (angle / Math.PI), power = 1, sum = 0;
        for (int n = 1; n <= 30; n++)
        {
            power *= square;
            sum += Zeta(2 * n) * power / (n * ((2 * n) + 1.0));
        }
        return angle * (1 - Math.Log(2 * angle) + sum);
    }

    // Riemann's zeta function at 2, 4, 6, ...; from 6 on the sum to 60 with the Euler-Maclaurin tail.
    private static double Zeta(int s)
    {
        if (s == 2)
            return Math.PI * Math.PI / 6;
        double sum = 0;
        for (int k = 60; k >= 1; k--)
            sum += Math.Pow(k, -s);
        double tail = Math.Pow(60, 1 - s) * ((1.0 / (s - 1)) - (1 / 120.0) + (s / (12 * 3600.0)) - (s * (s + 1.0) * (s + 2) / (720 * 3600.0 * 3600)));
        return sum + tail;
    }

    private static ExactValue Value(double value, string note) => new(value, 16 * Constants.Epsilon * Math.Max(1, Math.Abs(value)), Source, note);
}
