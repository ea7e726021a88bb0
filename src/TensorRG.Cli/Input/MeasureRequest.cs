using System.Collections.Immutable;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics.Measurements;

namespace TensorRG.Cli.Input;

/// <summary>A checked request to measure.</summary>
internal sealed record MeasureRequest
{
    public required ParameterRequest Model { get; init; }

    /// <summary>What to measure; null for all that the model has.</summary>
    public ImmutableArray<string>? Quantities { get; init; }

    public required string Method { get; init; }

    public required int BondDimension { get; init; }

    public int? TorusLength { get; init; }

    public NetworkForm Form { get; init; }

    public long Seed { get; init; }

    public int Threads { get; init; }

    public string Backend { get; init; } = "";

    /// <summary>The inputs of the measurement at some parameters of the model.</summary>
    public MeasurementInputs Inputs(ParameterSet parameters) => new()
    {
        Parameters = parameters,
        Quantities = Quantities ?? [.. QuantityCatalogue.Defaults(parameters)],
        Method = Method,
        BondDimension = BondDimension,
        TorusLength = TorusLength,
        Form = Form,
        Seed = Seed,
    };
}
