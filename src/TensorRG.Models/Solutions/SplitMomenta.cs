using TensorRG.Tensors;

namespace TensorRG.Models.Solutions;

/// <summary>
/// Mean over a momentum w in (0, pi) of a function that bends sharply at one momentum inside: the double-exponential rule
/// (H. Takahasi, M. Mori, Publ. RIMS 9, 721, 1974) on either side of it, the nodes crowding there and at both ends.
/// </summary>
internal static class SplitMomenta
{
    private const double Step = 1.0 / 256;
    private const int Nodes = 820;

    /// <summary>(1/pi) int_0^pi f dw, value and derivatives.</summary>
    /// <param name="split">The momentum of the bend, between 0 and pi.</param>
    /// <param name="integrand">f from 1 - cos w and from cos(split) - cos(w), both without cancellation.</param>
    public static Jet Mean(double split, Func<double, double, Jet> integrand)
    {
        CompensatedSum value = default, first = default, second = default;
        for (int n = -Nodes; n <= Nodes; n++)
        {
            (double left, double right, double weight) = Node(n * Step);
            Add(split * weight, integrand(Lift(split * left), -Rise(split, -split * right)));
            double beyond = Math.PI - split;
            Add(beyond * weight, integrand(Lift(split + (beyond * left)), Rise(split, beyond * left)));
        }
        return new Jet(value.Value, first.Value, second.Value);

        void Add(double weight, Jet f)
        {
            value.Add(weight / Math.PI * f.Value);
            first.Add(weight / Math.PI * f.First);
            second.Add(weight / Math.PI * f.Second);
        }
    }

    private static double Lift(double w) => 2 * Math.Sin(w / 2) * Math.Sin(w / 2);

    // |cos(split) - cos(split + step)|.
    private static double Rise(double split, double step) => 2 * Math.Sin(split + (step / 2)) * Math.Sin(Math.Abs(step) / 2);

    // Fractions of an interval to the left and to the right of a node, and the node's weight.
    private static (double Left, double Right, double Weight) Node(double t)
    {
        double e = Math.Exp(-Math.PI * Math.Sinh(Math.Abs(t)));
        double small = e / (1 + e), large = 1 / (1 + e);
        double weight = Step * Math.PI * Math.Cosh(t) * small * large;
        return t < 0 ? (small, large, weight) : (large, small, weight);
    }
}
