namespace TensorRG.Models.Solutions;

/// <summary>Honeycomb Ising model, parameters temperature, J1, J2, J3 and, if there is one, h = 0: see <see cref="HoneycombIsing"/>.</summary>
internal sealed class KnownIsingHoneycomb : KnownSolution
{
    private const string Source = "R. M. F. Houtappel, Physica 16, 425 (1950)";
    private const string OrderSource = "S. Naya, Prog. Theor. Phys. 11, 53 (1954)";

    /// <inheritdoc/>
    public override string Name => "ising-honeycomb";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.EnergyPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.EntropyPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.SpecificHeatPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.SpontaneousMagnetisation, "h = 0, any T, J1, J2, J3 (0 unless all are positive)", OrderSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        if (HasField(parameters))
            return CriticalPoint.None("a magnetic field removes the transition of the ferromagnet, and that of the antiferromagnet in a field is not known exactly");
        (double j1, double j2, double j3) = Couplings(parameters);
        (double low, double high) = (Math.Min(j1, Math.Min(j2, j3)), Math.Max(j1, Math.Max(j2, j3)));
        if (low == 0)
            return CriticalPoint.None("with one coupling zero the lattice falls apart into chains, which do not order at any temperature above zero");
        double value = low == high ? 2 * low / Math.Log(2 + Math.Sqrt(3)) : CriticalRoot.Solve(t => HoneycombIsing.At(t, j1, j2, j3).Kernel.Distance, high);
        string note = low == high ? "2 |J| / ln(2 + sqrt 3)" : "root of cosh(L1+L2+L3) = cosh(-L1+L2+L3) + cosh(L1-L2+L3) + cosh(L1+L2-L3), L = |J|/T";
        return CriticalPoint.At(new ExactValue(value, 8 * Constants.Epsilon * value, Source, note));
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters)
        => HasField(parameters) ? null : Values(parameters).Exact(quantity, Source, OrderSource);

    private static Thermal Values(ParameterSet parameters)
    {
        (double j1, double j2, double j3) = Couplings(parameters);
        double t = parameters.Temperature;
        HoneycombIsing model = HoneycombIsing.At(t, j1, j2, j3);
        bool isFerromagnet = parameters["J1"] > 0 && parameters["J2"] > 0 && parameters["J3"] > 0;
        double order = isFerromagnet ? Math.Pow(model.Kernel.MagnetisationEighth, 0.125) : 0;
        return new Thermal(t, (j1 + j2 + j3) / (2 * t), model.LogZRest(), model.Kernel.Distance.Value == 0, order);
    }

    private static (double J1, double J2, double J3) Couplings(ParameterSet parameters)
        => (Math.Abs(parameters["J1"]), Math.Abs(parameters["J2"]), Math.Abs(parameters["J3"]));
}
