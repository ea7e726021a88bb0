namespace TensorRG.Models.Solutions;

/// <summary>Triangular Ising model, parameters temperature, J1, J2, J3 and, if there is one, h = 0: see <see cref="TriangularIsing"/>.</summary>
internal sealed class KnownIsingTriangular : KnownSolution
{
    private const string Source = "R. M. F. Houtappel, Physica 16, 425 (1950); G. H. Wannier, Phys. Rev. 79, 357 (1950), erratum Phys. Rev. B 7, 5017 (1973)";
    private const string OrderSource = "R. B. Potts, Phys. Rev. 88, 352 (1952); J. Stephenson, J. Math. Phys. 5, 1009 (1964) for different couplings";

    /// <inheritdoc/>
    public override string Name => "ising-triangular";

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> References { get; } =
    [
        new(Quantity.LogZPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.EnergyPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.EntropyPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.SpecificHeatPerSite, "h = 0, any T, J1, J2, J3", Source),
        new(Quantity.SpontaneousMagnetisation, "h = 0, any T, J1, J2, J3", OrderSource),
    ];

    /// <inheritdoc/>
    public override CriticalPoint CriticalTemperature(ParameterSet parameters)
    {
        if (HasField(parameters))
            return CriticalPoint.None("in a magnetic field no transition temperature is known exactly");
        double j1 = parameters["J1"], j2 = parameters["J2"], j3 = parameters["J3"];
        double scale = Math.Max(Math.Abs(j1), Math.Max(Math.Abs(j2), Math.Abs(j3)));
        if (scale == 0 || !At(scale).Orders)
            return CriticalPoint.None("with these couplings it does not order above zero temperature: they are frustrated, with two equal weakest ones, or the lattice falls apart into chains");
        bool equal = Math.Abs(j1) == scale && Math.Abs(j2) == scale && Math.Abs(j3) == scale;
        double value = equal ? 4 * scale / Math.Log(3) : CriticalRoot.Solve(t => At(t).Kernel.Distance, scale);
        string note = equal ? "4 |J| / ln 3" : "root of exp(-2(J1+J2)/T) + exp(-2(J1+J3)/T) + exp(-2(J2+J3)/T) = 1, signs gauged to the weakest coupling";
        return CriticalPoint.At(new ExactValue(value, 8 * Constants.Epsilon * value, Source, note));

        TriangularIsing At(double t) => new(t, j1, j2, j3);
    }

    /// <inheritdoc/>
    protected override ExactValue? Find(string quantity, ParameterSet parameters) => HasField(parameters)
        ? null
        : new TriangularIsing(parameters.Temperature, parameters["J1"], parameters["J2"], parameters["J3"]).Values().Exact(quantity, Source, OrderSource);
}
