using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Points;

/// <summary>Everything that determines the numbers of a sweep: a measurement, repeated over a grid of parameters.</summary>
public sealed record SweepInputs
{
    /// <summary>What is measured at each point; of its parameters those count that neither an axis nor the temperature rule sets.</summary>
    public required MeasurementInputs Measurement { get; init; }

    /// <summary>The text that defines the model; null for a model of the catalogue.</summary>
    public string? Definition { get; init; }

    /// <summary>The axes, the first running slowest; at least one, no parameter on two of them.</summary>
    public required ImmutableArray<SweepAxis> Axes { get; init; }

    /// <summary>Where the temperature comes from.</summary>
    public TemperatureRule Temperature { get; init; }

    /// <summary>Name of the linear-algebra backend.</summary>
    public required string Backend { get; init; }

    /// <summary>Version of the algorithms, <see cref="FlowFactory.NumericsVersion"/>.</summary>
    public required int NumericsVersion { get; init; }

    /// <summary>The model.</summary>
    public Model Model => Measurement.Parameters.Model;

    /// <summary>Number of points.</summary>
    public int Count => Axes.Aggregate(1, static (count, axis) => checked(count * axis.Values.Length));

    /// <summary>SHA-256 of the canonical JSON of the inputs, as 64 lower-case hexadecimal digits.</summary>
    public string Identity => CanonicalJson.Hash(SweepInputsJson.Write(this));

    /// <summary>The values of a point on the axes.</summary>
    /// <param name="index">Point, from 0; the last axis runs fastest.</param>
    public ImmutableArray<double> Coordinates(int index)
    {
        var coordinates = new double[Axes.Length];
        for (int a = Axes.Length - 1; a >= 0; a--)
        {
            coordinates[a] = Axes[a].Values[index % Axes[a].Values.Length];
            index /= Axes[a].Values.Length;
        }

        return [.. coordinates];
    }

    /// <summary>What is measured at a point.</summary>
    /// <param name="index">Point, from 0.</param>
    /// <exception cref="ModelException">The values do not go together, or no critical temperature is known there.</exception>
    public MeasurementInputs At(int index)
    {
        ImmutableArray<double> coordinates = Coordinates(index);
        IEnumerable<KeyValuePair<string, double>> swept = Axes.Zip(coordinates).SelectMany(static p => p.First.Parameters.Select(name => KeyValuePair.Create(name, p.Second)));
        ParameterSet parameters = Model.CreateParameters(Measurement.Parameters.Values.Where(p => IsFixed(p.Key)).Concat(swept));
        return Measurement with
        {
            Parameters = Temperature == TemperatureRule.Critical ? Model.AtCriticalTemperature(parameters) : parameters,
        };
    }

    /// <summary>Identity of the measurement at a point.</summary>
    /// <param name="index">Point, from 0.</param>
    public string PointIdentity(int index) => MeasurementJson.Identity(At(index), Definition, Backend, NumericsVersion);

    /// <summary>Whether both have the same identity.</summary>
    /// <param name="other">The inputs to compare with.</param>
    public bool Equals(SweepInputs? other) => other is not null && Identity == other.Identity;

    /// <inheritdoc/>
    public override int GetHashCode() => Identity.GetHashCode(StringComparison.Ordinal);

    /// <summary>Whether a parameter has the same given value at all points.</summary>
    internal bool IsFixed(string parameter)
        => (Temperature == TemperatureRule.Given || parameter != ParameterDefinition.TemperatureName)
        && !Axes.Any(a => a.Parameters.Contains(parameter));
}
