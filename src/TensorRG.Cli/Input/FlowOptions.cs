using System.CommandLine;
using TensorRG.CoarseGraining;

namespace TensorRG.Cli.Input;

/// <summary>The options that say what to compute; shared by all commands that coarse-grain.</summary>
internal sealed class FlowOptions
{
    /// <summary>Steps when none are given: 22 doublings of the length, from the lattice to an everyday object.</summary>
    public const int DefaultSteps = 44;

    /// <summary>Largest bond dimension accepted: beyond it no tensor fits in memory.</summary>
    public const int LargestBondDimension = 2000;

    /// <summary>Most steps accepted: 2^1000 sites still have a logarithm.</summary>
    public const int MostSteps = 1000;

    private readonly ModelOptions _model = new();
    private readonly MachineOptions _machine = new();

    public Option<string> Scheme { get; } = ChoiceOption.OneOf("--scheme", "Coarse-graining scheme.", SchemeRegistry.Default.Name, [.. SchemeRegistry.All.Select(static s => s.Name)]);

    public Option<int> Steps { get; } = NumberOption.Whole("--steps", "Number of coarse-graining steps; each makes one tensor of two.", DefaultSteps, 0, MostSteps);

    public Option<string> Cut { get; } = ChoiceOption.OneOf("--cut", "Where a truncation may cut: 'multiplets' never inside a degenerate multiplet, 'anywhere' at exactly the bond dimension.", "multiplets", "multiplets", "anywhere");

    public Option<string> Grading { get; } = ChoiceOption.OneOf("--grading", "Whether tensors are block-sparse by the model's symmetry: same numbers, less time.", "on", "on", "off");

    public Option<string> Form { get; } = ChoiceOption.OneOf("--form", "Form of the tensor network; 'tensorrg models MODEL' says which one auto takes.", "auto", NetworkForms.Names);

    public Option<string> Decomposition { get; } = ChoiceOption.OneOf("--decomposition", "How singular values are found: 'iterative' keeps to rings of three-leg pieces unless the tensor is small or its spectrum too slow, 'full' decomposes the tensor completely (slow, for checks).", "auto", "auto", "iterative", "full");

    public Option<double?> BondExponent { get; } = NumberOption.Real("--bond-exponent", "Exponent k of the bond weights; bond-weighted scheme only. Error bars are calibrated for the default of -0.5.", -1, 0.5);

    public Option<long> Seed { get; } = NumberOption.Long("--seed", "Seed of the random blocks of the iterative decomposition.", 1);

    public void AddTo(Command command)
    {
        foreach (Option option in (Option[])[_model.Temperature, _model.Set, Scheme, Steps, Cut, Grading, Form, Decomposition, BondExponent, Seed, _machine.Threads, _machine.Backend])
            command.Options.Add(option);
        command.Arguments.Add(_model.Model);
    }

    public FlowRequest Read(ParseResult result)
        => FlowRequest.Create(
            _model.Read(result),
            result.GetRequiredValue(Scheme),
            result.GetValue(BondExponent)) with
        {
            Steps = result.GetRequiredValue(Steps),
            CutsAnywhere = result.GetRequiredValue(Cut) == "anywhere",
            IsGraded = result.GetRequiredValue(Grading) == "on",
            Form = NetworkForms.Read(result.GetRequiredValue(Form)),
            Decomposition = Enum.Parse<DecompositionMode>(result.GetRequiredValue(Decomposition), ignoreCase: true),
            Seed = result.GetRequiredValue(Seed),
            Threads = result.GetRequiredValue(_machine.Threads),
            Backend = result.GetRequiredValue(_machine.Backend),
        };
}
