namespace TensorRG.Models;

/// <summary>What the literature knows exactly about a model; a model file names it with <c>solution = "..."</c>.</summary>
public interface IKnownSolution
{
    /// <summary>Name in model files: lower case, no spaces.</summary>
    string Name { get; }

    /// <summary>What is known, where it holds and who published it.</summary>
    IReadOnlyList<ExactReference> References { get; }

    /// <summary>The exact critical temperature at the other parameters, or why there is none.</summary>
    /// <param name="parameters">Parameters of the model; the temperature, if any, does not matter.</param>
    CriticalPoint CriticalTemperature(ParameterSet parameters);

    /// <summary>An exact value per site of the infinite lattice, or null where none is known.</summary>
    /// <param name="quantity">ln-z, energy, entropy, specific-heat, magnetisation, density, latent-heat, or the name of an observable.</param>
    /// <param name="parameters">Parameters of the model.</param>
    ExactValue? Exact(string quantity, ParameterSet parameters);

    /// <summary>A network made for this model by hand, more accurate in its small elements than one from tables; null for none.</summary>
    /// <param name="parameters">Parameters of the model.</param>
    VertexNetwork? Network(ParameterSet parameters);
}
