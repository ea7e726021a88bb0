using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Models.Tests.Literature;

/// <summary>Sums over all configurations. Weights are divided by exp(LogScale), the largest of them.</summary>
internal sealed class ConfigurationSum
{
    private readonly Dictionary<string, (Complex Value, double Scale)> sums = [];

    public ConfigurationSum(LiteratureModel model)
    {
        LogScale = model.Configurations().Max(s => model.LogWeight(s).Real + model.LogMeasure(s));
        (Z, Scale) = Sum(model, static _ => 1);
        foreach ((string name, Func<int[], Complex> value) in model.Observables)
            sums.Add(name, Sum(model, value));
    }

    public double LogScale { get; }

    /// <summary>Z / exp(LogScale).</summary>
    public Complex Z { get; }

    /// <summary>The sum of the absolute values of the weights, likewise.</summary>
    public double Scale { get; }

    public IReadOnlyCollection<string> Names => sums.Keys;

    /// <summary>The sum of weight times observable, and of its absolute values, likewise.</summary>
    public (Complex Value, double Scale) Of(string observable) => sums[observable];

    // Compensated: a plain sum of many thousand terms would be the least accurate number of a comparison.
    private (Complex Value, double Scale) Sum(LiteratureModel model, Func<int[], Complex> value)
    {
        CompensatedSum real = default, imaginary = default;
        double scale = 0;
        foreach (int[] s in model.Configurations())
        {
            Complex log = model.LogWeight(s) + model.LogMeasure(s);
            if (double.IsNegativeInfinity(log.Real))
                continue;
            log -= LogScale;
            Complex term = Complex.FromPolarCoordinates(Math.Exp(log.Real), log.Imaginary) * value(s);
            real.Add(term.Real);
            imaginary.Add(term.Imaginary);
            scale += Complex.Abs(term);
        }
        return (new(real.Value, imaginary.Value), scale);
    }
}
