using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;
using System.Numerics;

namespace TensorRG.Cli.Input;

/// <summary>The options that say what to measure and how; shared by <c>measure</c> and <c>sweep</c>.</summary>
internal sealed class MeasureOptions
{
    private const int DefaultBondDimension = 32;
    private const int DefaultOfBlocks = 16;
    private const string Blocks = "blocks";
    private const int LargestTorus = 1 << 20;

    private readonly ModelOptions _model = new();
    private readonly MachineOptions _machine;
    private readonly Option<int> _bondDimension = NumberOption.Whole("--bond-dimension", "Most states kept on a bond (chi); with blocks, which cost chi^7, the default is 16.", DefaultBondDimension, 1, FlowOptions.LargestBondDimension);
    private readonly Option<string> _method = ChoiceOption.OneOf("--method", "'boundary': infinite lattice, from fixed points of the row-to-row transfer matrix; 'blocks': HOTRG with impurity tensors, the default with --torus.", "boundary", "boundary", Blocks);
    private readonly Option<string> _form = ChoiceOption.OneOf("--form", "Form of the tensor network.", "auto", NetworkForms.Names);
    private readonly Option<long> _seed = NumberOption.Long("--seed", "Seed of the starting states.", 1);

    private readonly Option<string> _observables = new("--observables", "-o")
    {
        Description = "What to measure: ln-z, free-energy, energy, entropy, specific-heat, susceptibility, any observable of the model. Default: all that the model has.",
        HelpName = "NAME,NAME,...",
    };

    private readonly Option<int?> _torus = new("--torus")
    {
        Description = "Linear size of a torus in network vertices, a power of two: then also NAME^2, NAME^4 and binder. Default: the infinite lattice.",
        HelpName = "L",
        CustomParser = ReadTorus,
    };

    /// <param name="threads">What the threads do; null for the usual text.</param>
    public MeasureOptions(string? threads = null)
    {
        _machine = new MachineOptions();
        if (threads is not null)
            _machine.Threads.Description = threads;
        _bondDimension.Aliases.Add("-c");
    }

    public void AddTo(Command command)
    {
        foreach (Option option in (Option[])[_model.Temperature, _model.Set, _observables, _method, _bondDimension, _torus, _form, _seed, _machine.Threads, _machine.Backend])
            command.Options.Add(option);
        command.Arguments.Add(_model.Model);
    }

    /// <summary>Reads all options.</summary>
    /// <exception cref="UsageException">Contradictory or unreadable options.</exception>
    public MeasureRequest Read(ParseResult result) => new()
    {
        Model = _model.Read(result),
        Quantities = result.GetValue(_observables) is { } text ? QuantityList.Read(text) : null,
        Method = Method(result),
        BondDimension = Method(result) == Blocks && result.GetResult(_bondDimension) is not { Implicit: false } ? DefaultOfBlocks : result.GetRequiredValue(_bondDimension),
        TorusLength = result.GetValue(_torus),
        Form = NetworkForms.Read(result.GetRequiredValue(_form)),
        Seed = result.GetRequiredValue(_seed),
        Threads = result.GetRequiredValue(_machine.Threads),
        Backend = result.GetRequiredValue(_machine.Backend),
    };

    /// <summary>A torus needs blocks: where no method is given it chooses them.</summary>
    private string Method(ParseResult result)
        => result.GetValue(_torus) is not null && result.GetResult(_method) is not { Implicit: false } ? Blocks : result.GetRequiredValue(_method);

    private static int? ReadTorus(ArgumentResult result)
    {
        string text = result.Tokens[0].Value;
        if (int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int length) && length is >= 1 and <= LargestTorus && BitOperations.IsPow2(length))
            return length;
        result.AddError(FormattableString.Invariant($"--torus takes a power of two from 1 to {LargestTorus}, such as 16, not '{text}'."));
        return null;
    }
}
