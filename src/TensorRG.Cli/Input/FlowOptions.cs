using System.CommandLine;
using System.CommandLine.Parsing;
using TensorRG.CoarseGraining;
using TensorRG.Tensors.Kernels;

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

    public Argument<string> Model { get; } = TextInput.Required("model", "Name of a model; 'tensorrg models' lists them.");

    public Option<string> Temperature { get; } = new("--temperature", "-T")
    {
        Description = "Temperature (k_B = 1, in units of the coupling), or 'critical' where that is known exactly. Default: critical.",
        HelpName = "T|critical",
    };

    public Option<string[]> Set { get; } = new("--set", "-s")
    {
        Description = "Value of a model parameter; repeat for more.",
        HelpName = "NAME=VALUE",
    };

    public Option<string> Scheme { get; } = OneOf("--scheme", "Coarse-graining scheme.", SchemeRegistry.Default.Name, [.. SchemeRegistry.All.Select(static s => s.Name)]);

    public Option<int> Steps { get; } = NumberOption.Whole("--steps", "Number of coarse-graining steps; each makes one tensor of two.", DefaultSteps, 0, MostSteps);

    public Option<string> Cut { get; } = OneOf("--cut", "Where a truncation may cut: 'multiplets' never inside a degenerate multiplet, 'anywhere' at exactly the bond dimension.", "multiplets", "multiplets", "anywhere");

    public Option<string> Grading { get; } = OneOf("--grading", "Whether tensors are block-sparse by the model's symmetry: same numbers, less time.", "on", "on", "off");

    public Option<string> Decomposition { get; } = OneOf("--decomposition", "How singular values are found: 'iterative' keeps to rings of three-leg pieces unless the tensor is small or its spectrum too slow, 'full' decomposes the tensor completely (slow, for checks).", "auto", "auto", "iterative", "full");

    public Option<double?> BondExponent { get; } = NumberOption.Real("--bond-exponent", "Exponent k of the bond weights; bond-weighted scheme only. Error bars are calibrated for the default of -0.5.", -1, 0.5);

    public Option<long> Seed { get; } = NumberOption.Long("--seed", "Seed of the random blocks of the iterative decomposition.", 1);

    public Option<int> Threads { get; } = NumberOption.Whole("--threads", "Threads; the bits of the result do not depend on them. Default: all cores.", Environment.ProcessorCount, 1, 256);

    public Option<string> Backend { get; } = OneOf("--backend", "Linear algebra: 'managed' needs nothing installed; others use what they find.", Backends.Default, [.. Backends.Names]);

    public void AddTo(Command command)
    {
        foreach (Option option in (Option[])[Temperature, Set, Scheme, Steps, Cut, Grading, Decomposition, BondExponent, Seed, Threads, Backend])
            command.Options.Add(option);
        command.Arguments.Add(Model);
    }

    public FlowRequest Read(ParseResult result)
        => FlowRequest.Create(
            result.GetRequiredValue(Model),
            result.GetValue(Temperature),
            result.GetValue(Set) ?? [],
            result.GetRequiredValue(Scheme),
            result.GetValue(BondExponent)) with
        {
            Steps = result.GetRequiredValue(Steps),
            CutsAnywhere = result.GetRequiredValue(Cut) == "anywhere",
            IsGraded = result.GetRequiredValue(Grading) == "on",
            Decomposition = Enum.Parse<DecompositionMode>(result.GetRequiredValue(Decomposition), ignoreCase: true),
            Seed = result.GetRequiredValue(Seed),
            Threads = result.GetRequiredValue(Threads),
            Backend = result.GetRequiredValue(Backend),
        };

    private static Option<string> OneOf(string name, string description, string fallback, params string[] values)
        => new(name)
        {
            Description = description,
            DefaultValueFactory = _ => fallback,
            HelpName = string.Join('|', values),
            CustomParser = result => Choose(result, name, values),
        };

    private static string Choose(ArgumentResult result, string name, string[] values)
    {
        string text = result.Tokens[0].Value;
        if (!values.Contains(text))
            result.AddError($"{name} takes one of {string.Join(", ", values)}; not '{text}'.");
        return text;
    }
}
