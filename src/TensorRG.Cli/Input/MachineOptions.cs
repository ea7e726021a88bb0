using System.CommandLine;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Cli.Input;

/// <summary>The options that say on what to compute.</summary>
internal sealed class MachineOptions
{
    public Option<int> Threads { get; } = NumberOption.Whole("--threads", "Threads; the bits of the result do not depend on them. Default: all cores.", Environment.ProcessorCount, 1, 256);

    public Option<string> Backend { get; } = ChoiceOption.OneOf("--backend", "Linear algebra: 'managed' needs nothing installed; others use what they find.", Backends.Default, [.. Backends.Names]);
}
