using System.Numerics;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Runs;

/// <summary>Makes the flow that the inputs of a run describe.</summary>
public static class FlowFactory
{
    /// <summary>
    /// Version of everything that determines bits: raised whenever a change to kernels, schemes or estimates alters a
    /// stored number. A run begun under another version is not resumed.
    /// </summary>
    public const int NumericsVersion = 1;

    /// <summary>Name of the scheme option that holds the exponent of the bond weights.</summary>
    public const string BondExponentOption = "bondExponent";

    /// <summary>Name of the scheme option that says how singular values are found.</summary>
    public const string DecompositionOption = "decomposition";

    /// <summary>The inputs of a run of a model.</summary>
    /// <param name="parameters">The model's parameters.</param>
    /// <param name="scheme">The scheme.</param>
    /// <param name="settings">Cut, seed, decomposition and exponent.</param>
    /// <param name="steps">Number of steps.</param>
    /// <param name="graded">Whether symmetry is used.</param>
    /// <param name="backend">Name of the backend.</param>
    /// <param name="form">Form of the network.</param>
    public static RunInputs Describe(
        ParameterSet parameters, SchemeDefinition scheme, SchemeSettings settings, int steps, bool graded, string backend, NetworkForm form = NetworkForm.Auto)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        ArgumentNullException.ThrowIfNull(scheme);
        ArgumentNullException.ThrowIfNull(settings);
        var options = RunInputs.Empty.Add(DecompositionOption, Lower(settings.Decomposition));
        if (scheme.UsesBondExponent)
            options = options.Add(BondExponentOption, settings.BondExponent);
        return new RunInputs
        {
            Model = parameters.Model.Name,
            Definition = ModelCatalogue.StoredText(parameters.Model),
            NetworkForm = form == NetworkForm.Auto ? null : FormText(form),
            Parameters = RunInputs.Empty.AddRange(parameters.Values.Select(static p => KeyValuePair.Create(p.Key, InputValue.FromDouble(p.Value)))),
            Scheme = scheme.Name,
            SchemeOptions = options,
            BondDimension = settings.Cut.MaxDimension,
            Steps = steps,
            Seed = settings.Seed,
            MultipletGap = settings.Cut.MultipletGap,
            Graded = graded,
            ElementType = parameters.Model.Network(parameters, graded, form).IsReal ? "double" : "complex",
            Backend = backend,
            NumericsVersion = NumericsVersion,
        };
    }

    /// <summary>The model's parameters in the inputs.</summary>
    /// <param name="inputs">Inputs of a run.</param>
    /// <exception cref="ModelException">No such model or parameter in this program.</exception>
    public static ParameterSet Parameters(RunInputs inputs)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        return ModelCatalogue.Restore(inputs.Model, inputs.Definition)
            .CreateParameters(inputs.Parameters.Select(static p => KeyValuePair.Create(p.Key, p.Value.ToDouble())));
    }

    /// <summary>The scheme in the inputs.</summary>
    /// <param name="inputs">Inputs of a run.</param>
    /// <exception cref="RunStoreException">No such scheme in this program.</exception>
    public static SchemeDefinition Scheme(RunInputs inputs)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        return SchemeRegistry.Find(inputs.Scheme) ?? throw new RunStoreException(
            RunStoreProblem.OtherVersion,
            $"The run uses the scheme '{inputs.Scheme}', which this program does not have. It has: {string.Join(", ", SchemeRegistry.All.Select(static s => s.Name))}.");
    }

    /// <summary>A flow at step 0.</summary>
    /// <param name="inputs">Inputs of a run.</param>
    /// <param name="backend">The backend, of the name in the inputs.</param>
    public static IFlow Create(RunInputs inputs, Backend backend)
    {
        ArgumentNullException.ThrowIfNull(inputs);
        ArgumentNullException.ThrowIfNull(backend);
        return inputs.ElementType == "double" ? Create<double>(inputs, backend) : Create<Complex>(inputs, backend);
    }

    private static Flow<T> Create<T>(RunInputs inputs, Backend backend)
        where T : unmanaged, INumberBase<T>
    {
        ParameterSet parameters = Parameters(inputs);
        IScheme<T> scheme = Scheme(inputs).Create(new TensorAlgebra<T>(backend), Settings(inputs));
        return new Flow<T>(scheme, NetworkTensors.Build<T>(parameters.Model.Network(parameters, inputs.Graded, Form(inputs))));
    }

    private static NetworkForm Form(RunInputs inputs)
        => inputs.NetworkForm is { } name ? Enum.Parse<NetworkForm>(name, ignoreCase: true) : NetworkForm.Auto;

    private static string FormText(NetworkForm form) => Enum.GetName(form)!.ToLowerInvariant();

    private static SchemeSettings Settings(RunInputs inputs)
    {
        var settings = new SchemeSettings(new CutRule(inputs.BondDimension, inputs.MultipletGap)) { Seed = inputs.Seed };
        if (inputs.SchemeOptions.TryGetValue(DecompositionOption, out InputValue? decomposition))
            settings = settings with { Decomposition = Enum.Parse<DecompositionMode>(decomposition.ToString(), ignoreCase: true) };
        if (inputs.SchemeOptions.TryGetValue(BondExponentOption, out InputValue? exponent))
            settings = settings with { BondExponent = exponent.ToDouble() };
        return settings;
    }

    private static string Lower(DecompositionMode mode) => mode switch
    {
        DecompositionMode.Auto => "auto",
        DecompositionMode.Iterative => "iterative",
        _ => "full",
    };
}
