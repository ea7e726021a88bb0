using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Runs;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Cli.Input;

/// <summary>A checked request to coarse-grain a model.</summary>
internal sealed record FlowRequest
{
    private const double BondExponentDefault = -0.5;

    public required ParameterSet Parameters { get; init; }

    public required SchemeDefinition Scheme { get; init; }

    public double BondExponent { get; init; } = BondExponentDefault;

    public int Steps { get; init; }

    public bool CutsAnywhere { get; init; }

    public bool IsGraded { get; init; }

    public NetworkForm Form { get; init; }

    public DecompositionMode Decomposition { get; init; }

    public long Seed { get; init; }

    public int Threads { get; init; }

    public string Backend { get; init; } = "";

    /// <summary>Checks what was given as text.</summary>
    /// <exception cref="UsageException">Contradictory or unreadable options.</exception>
    /// <exception cref="ModelException">Unknown parameter, or a value that is not allowed.</exception>
    public static FlowRequest Create(ParameterRequest model, string schemeName, double? bondExponent)
    {
        SchemeDefinition scheme = SchemeRegistry.Find(schemeName)!;
        if (bondExponent is not null && !scheme.UsesBondExponent)
            throw new UsageException($"--bond-exponent has no meaning for the scheme '{scheme.Name}'. Leave it out, or choose --scheme bond-weighted.");
        return new FlowRequest
        {
            Parameters = model.Parameters(),
            Scheme = scheme,
            BondExponent = bondExponent ?? BondExponentDefault,
        };
    }

    /// <summary>The inputs of the run at one bond dimension.</summary>
    /// <exception cref="ModelException">The model has no network in this form, or one that does not fit in memory.</exception>
    public RunInputs Inputs(int bondDimension)
    {
        // Before a folder is made: a form that does not hold the terms, a tensor that does not fit.
        _ = Parameters.Model.Plan(Parameters, Form);
        var cut = new CutRule(bondDimension, CutsAnywhere ? 0 : CutRule.DefaultMultipletGap);
        var settings = new SchemeSettings(cut) { BondExponent = BondExponent, Decomposition = Decomposition, Seed = Seed };
        return FlowFactory.Describe(Parameters, Scheme, settings, Steps, IsGraded, Backend, Form);
    }
}
