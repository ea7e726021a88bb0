using System.Numerics;

namespace TensorRG.Models.Tests.Literature;

/// <summary>A model on a small torus, written from its published Hamiltonian or weights and from nothing else.</summary>
/// <param name="States">States of a variable.</param>
/// <param name="Variables">Variables of the whole torus.</param>
/// <param name="LogWeight">Logarithm of the weight of a configuration; minus infinity where it is excluded.</param>
/// <param name="Observables">Extensive quantities by name.</param>
internal sealed record LiteratureModel(
    int States, int Variables, Func<int[], Complex> LogWeight, IReadOnlyDictionary<string, Func<int[], Complex>> Observables)
{
    /// <summary>Logarithm of the weight that belongs to an integral over the variables.</summary>
    public Func<int[], double> LogMeasure { get; init; } = static _ => 0;

    /// <summary>A model with weights exp(-E/T).</summary>
    public static LiteratureModel Thermal(
        int states, int variables, double temperature, Func<int[], Complex> energy, params (string Name, Func<int[], Complex> Value)[] observables)
        => Weighted(states, variables, s => -energy(s) / temperature, [("energy", energy), .. observables]);

    /// <summary>A model given by weights.</summary>
    public static LiteratureModel Weighted(int states, int variables, Func<int[], Complex> log, params (string Name, Func<int[], Complex> Value)[] observables)
        => new(states, variables, log, observables.Append(("log-weight", log)).ToDictionary(static o => o.Item1, static o => o.Item2));

    /// <summary>All configurations; the same array every time.</summary>
    public IEnumerable<int[]> Configurations()
    {
        var s = new int[Variables];
        while (true)
        {
            yield return s;
            int i = 0;
            while (i < Variables && ++s[i] == States)
                s[i++] = 0;
            if (i == Variables)
                yield break;
        }
    }
}
