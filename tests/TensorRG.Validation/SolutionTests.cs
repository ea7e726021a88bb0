using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Physics.Measurements;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Validation;

/// <summary>
/// Every model file of the catalogue that names an exact solution, a published value or a critical temperature: what is measured on the tables of
/// the file against what is known exactly, so that both are the same model. The bounds are far below what another coupling, sign or direction would change;
/// where a model is solved at criticality alone they leave room for what a small bond dimension misses there.
/// </summary>
public sealed class SolutionTests
{
    private const double Sharp = 1e-6;

    private const double Critical = 1e-3;

    private const double Blocks = 1e-4;

    // Model, parameters, bound on ln Z; means may miss thirty times, specific heats a thousand times as much (measured at criticality: 1.8e-2 in the energy).
    private static readonly (string Model, (string Name, double Value)[] Parameters, double Bound)[] Points =
    [
        ("ising", [("T", 1.6), ("Jx", 1), ("Jy", 0.7)], Sharp),
        ("ising", [("T", 3.5), ("Jx", -0.8), ("Jy", 1.1)], Sharp),
        ("ising-triangular", [("T", 1.9), ("J1", 1), ("J2", 0.8), ("J3", 0.6)], Sharp),
        ("ising-triangular", [("T", 5), ("J1", -1), ("J2", 0.7), ("J3", 1.2)], Blocks),
        ("ising-honeycomb", [("T", 0.9), ("J1", 1), ("J2", 0.8), ("J3", 1.1)], Sharp),
        ("ising-honeycomb", [("T", 2.5), ("J1", -1), ("J2", 0.6), ("J3", 1.2)], Sharp),
        ("ising-kagome", [("T", 1.4), ("J", 1)], Sharp),
        ("ising-kagome", [("T", 2), ("J", -1)], Sharp),
        ("potts", [("T", 0.8), ("q", 2)], Sharp),
        ("potts", [("T", 1.5), ("q", 2), ("J", -0.9)], Sharp),
        ("potts", [("q", 3), ("J", 1.3)], Critical),
        ("clock", [("T", 1.4), ("q", 2), ("J", 0.9)], Sharp),
        ("clock", [("T", 1.6), ("q", 4), ("J", -1.1)], Sharp),
        ("clock", [("q", 3)], Critical),
        ("ashkin-teller", [("T", 3.4), ("K", 0)], Sharp),
        ("ashkin-teller", [("T", 1.6), ("J", 0), ("K", 0.9)], Sharp),
        ("ashkin-teller", [], Critical),
        ("six-vertex", [("a", 1), ("b", 0.8), ("c", 3.5)], Blocks),
        ("six-vertex", [("a", 0.7), ("b", 1.2), ("c", 4)], Blocks),
        ("six-vertex", [], Critical),
        ("eight-vertex", [("a", 1), ("b", 1.3), ("c", 6), ("d", 0.7)], Blocks),
        ("eight-vertex", [("a", 6), ("b", 1), ("c", 0.8), ("d", 0.6)], Blocks),
        ("dimers", [("x", 1), ("y", 2.5)], Critical),
        ("dimers", [("x", 1.3), ("y", 1)], Critical),
        ("dimers-honeycomb", [("x1", 1.2), ("x2", 0.9), ("x3", 1)], Critical),
        ("dimers-honeycomb", [("x1", 1), ("x2", 1.1), ("x3", 1.5)], Critical),
        ("hard-hexagons", [("z", 0.5)], Sharp),
        ("hard-hexagons", [("z", 3)], Sharp),
        ("hard-squares", [("z", 1)], Sharp),
        ("field", [("a", 0.8), ("b", 0), ("h", 0.3), ("nodes", 12), ("width", 0.6)], Sharp),
        ("field", [("T", 1.3), ("a", 1.4), ("b", 0), ("h", 0.5), ("nodes", 12), ("width", 0.62)], Sharp),
        ("ising-imaginary-field", [("T", 2), ("J", 0), ("h.re", 0.2), ("h.im", 0.7)], Sharp),
        ("ising-imaginary-field", [("T", 1.3), ("J", 0), ("h.re", 0), ("h.im", 0.4)], Sharp),
        ("ising-next-nearest", [("J1", 1.2)], Critical),
        ("ising-next-nearest", [("J1", 0), ("J2", 0.8)], Critical),
        ("potts-triangular", [("q", 2), ("J", 1.4)], Critical),
        ("spin-1", [("J", 0), ("T", 0.9), ("D", 0.5), ("h", 0.3)], Sharp),
        ("spin-1", [("J", 1.1), ("K", 3.3), ("D", 8.8)], Critical),
        ("xy", [("J", 0), ("nodes", 8)], Sharp),
        ("xy-density", [("J", 0), ("nodes", 8)], Sharp),
    ];

    public static TheoryData<int> Numbers() => [.. Enumerable.Range(0, Points.Length)];

    [Theory]
    [MemberData(nameof(Numbers))]
    public void The_file_and_what_is_known_exactly_are_one_model(int number)
    {
        (string model, (string, double)[] given, double bound) = Points[number];
        ParameterSet parameters = Computation.Parameters(model, given);
        ImmutableArray<string> quantities = [.. Measurable(parameters)];
        Assert.NotEmpty(quantities);
        var inputs = new MeasurementInputs { Parameters = parameters, Quantities = quantities, BondDimension = 12 };
        Measurement measured = new MeasurementEngine(Backends.Create(Backends.Default, 2)).Measure(inputs, null, CancellationToken.None);
        string[] wrong = [.. measured.Values.Where(v => !(Deviation(v, parameters) <= Bound(v.Name, bound))).Select(v => $"{v.Name}: {v.Value.Value:R} instead of {v.Exact?.Value:R}, off by {Deviation(v, parameters):e2}")];
        Assert.True(wrong.Length == 0, $"{model} {string.Join(", ", given)}: {string.Join("; ", wrong)}");
    }

    [Fact]
    public void All_files_with_something_known_exactly_are_there()
    {
        string[] known = [.. ModelCatalogue.All.Where(static m => m.ExactReferences.Count > 0).Select(static m => m.Name)];
        Assert.Equal(known, Points.Select(static p => p.Model).Distinct().Order(StringComparer.Ordinal));
    }

    // Latent heats are no averages of one state, and the ordered state and the variance of many states take long; energies at a first-order transition are those of one of the two phases.
    private static IEnumerable<string> Measurable(ParameterSet parameters)
        => parameters.Model.ExactReferences.Select(static r => r.Quantity).Distinct()
            .Where(q => q != QuantityNames.Name(Quantity.LatentHeat) && parameters.Model.Exact(q, parameters) is not null)
            .Where(q => q is not ("magnetisation" or "specific-heat") || parameters.Model.Name == "ising")
            .Where(q => q == "ln-z" || !(parameters.Model.Exact(Quantity.LatentHeat, parameters)?.Value > 0));

    private static double Bound(string quantity, double bound) => quantity switch
    {
        "ln-z" => bound,
        "specific-heat" => 1000 * bound,
        _ => 30 * bound,
    };

    private static double Deviation(Measured value, ParameterSet parameters)
    {
        double exact = parameters.Model.Exact(value.Name, parameters)!.Value;
        double found = value.Name == "magnetisation" ? Math.Abs(value.Value.Value) : value.Value.Value;
        return Math.Abs(found - exact);
    }
}
