namespace TensorRG.Models.Solutions;

/// <summary>What the exact solutions share.</summary>
internal abstract class KnownSolution : IKnownSolution
{
    private static readonly string[] FieldNames = ["h", "h.re", "h.im"];

    /// <inheritdoc/>
    public abstract string Name { get; }

    /// <inheritdoc/>
    public abstract IReadOnlyList<ExactReference> References { get; }

    /// <inheritdoc/>
    public virtual CriticalPoint CriticalTemperature(ParameterSet parameters)
        => CriticalPoint.None("the model is given by weights and has no temperature");

    /// <inheritdoc/>
    public ExactValue? Exact(string quantity, ParameterSet parameters)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        ExactValue? found = Find(quantity, parameters);
        return found is null && quantity == "entropy" && parameters.Model.HasTemperature ? Entropy(parameters) : found;
    }

    /// <inheritdoc/>
    public virtual VertexNetwork? Network(ParameterSet parameters) => null;

    /// <summary>True if the model has a magnetic field h, real or complex, that is not zero.</summary>
    protected static bool HasField(ParameterSet parameters)
        => FieldNames.Any(name => parameters.Model.Parameters.Any(p => p.IsCalled(name)) && parameters[name] != 0);

    /// <summary>See <see cref="Exact"/>; the entropy follows from ln Z and the energy where it is not given.</summary>
    protected abstract ExactValue? Find(string quantity, ParameterSet parameters);

    private ExactValue? Entropy(ParameterSet parameters)
    {
        if (Find("ln-z", parameters) is not { } logZ || Find("energy", parameters) is not { } energy)
            return null;
        double t = parameters.Temperature;
        return new ExactValue(logZ.Value + (energy.Value / t), logZ.Uncertainty + (energy.Uncertainty / t), logZ.Source, $"ln Z + U/T; {logZ.Note}");
    }
}
