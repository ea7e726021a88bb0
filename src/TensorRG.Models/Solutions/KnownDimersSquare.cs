using MathNet.Numerics.Integration;

namespace TensorRG.Models.Solutions;

/// <summary>
/// Close-packed dimers on the square lattice, activities x (horizontal) and y (vertical): ln Z per site = (ln y)/2 + (1/pi) int_0^(x/y) arctan(t)/t dt,
/// with arctan(x/y)/pi horizontal dimers per site (P. W. Kasteleyn, Physica 27, 1209, 1961).
/// </summary>
internal sealed class KnownDimersSquare : KnownSolution
{
    private const string Source = "P. W. Kasteleyn, Physica 27, 1209 (1961)";

    // The integrand over 0..tau, tau <= 1, is analytic but for +-i: 40 nodes leave less than 1e-17.
    private static readonly GaussLegendreRule Rule = new(0, 1, 40);

    /// <inheritdoc/>
    public override string Name => "dimers-square";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "any x and y", Source),
        new(Quantity.EntropyPerSite, "any x and y", Source),
        new("horizontal", "any x and y: horizontal dimers per site", Source),
        new("vertical", "any x and y: vertical dimers per site", Source),
    ];

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
    {
        double x = parameters["x"], y = parameters["y"];
        if (!(x > 0 && y > 0))
            return null;
        double horizontal = Math.Atan2(x, y) / Math.PI, vertical = Math.Atan2(y, x) / Math.PI;
        return quantity switch
        {
            "ln-z" => Value(LogZ(x, y), "integral of arctan(t)/t, by Gauss's rule"),
            "entropy" => Value(LogZ(x, y) - (horizontal * Math.Log(x)) - (vertical * Math.Log(y)), "ln Z less the mean logarithm of the weight"),
            "horizontal" => Value(horizontal, "arctan(x/y)/pi"),
            "vertical" => Value(vertical, "arctan(y/x)/pi"),
            _ => null,
        };
    }

    // Symmetric in x and y: take the ratio that is at most 1.
    private static double LogZ(double x, double y)
    {
        double small = Math.Min(x, y), large = Math.Max(x, y), tau = small / large, sum = 0;
        for (int i = 0; i < Rule.Order; i++)
            sum += Rule.GetWeight(i) * Math.Atan(tau * Rule.GetAbscissa(i)) / Rule.GetAbscissa(i);
        return (Math.Log(large) / 2) + (sum / Math.PI);
    }

    private static ExactValue Value(double value, string note) => new(value, 8 * Constants.Epsilon * Math.Max(1, Math.Abs(value)), Source, note);
}
