using System.Reflection;
using System.Text.RegularExpressions;

namespace TensorRG.EndToEnd.Architecture;

/// <summary>Rooms refer to one another one way only; kernels, the console and models stay where they belong.</summary>
public sealed partial class LayeringTests
{
    /// <summary>What each room may know, directly or through others.</summary>
    private static readonly Dictionary<string, string[]> Allowed = new()
    {
        ["Tensors"] = [],
        ["Models"] = ["Tensors"],
        ["CoarseGraining"] = ["Tensors"],
        ["Boundary"] = ["Tensors"],
        ["Physics"] = ["Tensors", "Models", "CoarseGraining", "Boundary"],
        ["Runs"] = ["Tensors", "Models", "CoarseGraining", "Boundary", "Physics"],
        ["Reports"] = ["Tensors", "Models", "CoarseGraining", "Boundary", "Physics"],
        ["Cli"] = ["Tensors", "Models", "CoarseGraining", "Boundary", "Physics", "Runs", "Reports"],
    };

    /// <summary>What other rooms may use of the kernels' namespace: choosing a backend, and its failures.</summary>
    private static readonly string[] PublicKernelTypes =
        ["Backend", "Backends", "BackendStatus", "BackendUnavailableException", "DecompositionException", "SimdPath", "SimdPaths"];

    [Fact]
    public void Every_room_has_its_rule() => Assert.Equal(Allowed.Keys.Order(StringComparer.Ordinal), SourceTree.Rooms);

    [Fact]
    public void Projects_refer_down_only()
    {
        foreach (string room in SourceTree.Rooms)
            Assert.All(SourceTree.References(room), reference => Assert.True(Allowed[room].Contains(reference), $"{room} must not refer to {reference}"));
    }

    [Fact]
    public void Compiled_rooms_use_only_what_lies_below_them()
    {
        foreach (string room in SourceTree.Rooms)
        {
            var assembly = Assembly.Load(room == "Cli" ? "tensorrg" : "TensorRG." + room);
            IEnumerable<string> used = assembly.GetReferencedAssemblies().Select(static a => a.Name!)
                .Where(static name => name.StartsWith("TensorRG.", StringComparison.Ordinal) || name == "tensorrg")
                .Select(static name => name == "tensorrg" ? "Cli" : name["TensorRG.".Length..]);
            Assert.All(used, name => Assert.True(Allowed[room].Contains(name), $"{room} must not use {name}"));
        }
    }

    [Fact]
    public void Only_Tensors_uses_kernels()
    {
        foreach (string file in SourceTree.Files("src").Where(static f => !f.StartsWith("src/TensorRG.Tensors/", StringComparison.Ordinal)))
        {
            string text = string.Join('\n', SourceTree.Lines(file).Select(Code));
            Assert.False(KernelType().Match(text) is { Success: true } match, $"{file} uses {KernelType().Match(text).Value}, which belongs to TensorRG.Tensors");
        }
    }

    /// <summary>The list that the previous test looks for is complete: every other type of the namespace is on it or is a backend's face.</summary>
    [Fact]
    public void The_public_kernel_types_are_known()
    {
        string[] types = [.. Assembly.Load("TensorRG.Tensors").GetExportedTypes()
            .Where(static t => t.Namespace?.StartsWith("TensorRG.Tensors.Kernels", StringComparison.Ordinal) == true)
            .Select(static t => t.Name.Split('`')[0])];
        Assert.NotEmpty(types);
        Assert.All(types, static t => Assert.True(PublicKernelTypes.Contains(t) || KernelType().IsMatch(t), $"{t} is a new public type of the kernels: say who may use it"));
    }

    [Fact]
    public void Only_Tensors_has_unsafe_code()
    {
        foreach (string file in SourceTree.Files("src").Where(static f => !f.StartsWith("src/TensorRG.Tensors/", StringComparison.Ordinal)))
            Assert.All(SourceTree.Lines(file), line => Assert.False(Unsafe().IsMatch(Code(line)), $"{file}: {line.Trim()}"));
    }

    [Fact]
    public void Only_the_command_line_touches_the_console()
    {
        foreach (string room in SourceTree.Rooms.Where(static r => r != "Cli"))
        {
            Assert.DoesNotContain("Spectre.Console", SourceTree.Packages(room));
            foreach (string file in SourceTree.Files("src/TensorRG." + room))
                Assert.All(SourceTree.Lines(file), line => Assert.False(Console().IsMatch(Code(line)), $"{file}: {line.Trim()}"));
        }
    }

    [Fact]
    public void Only_Reports_draws_and_only_Runs_stores()
    {
        foreach (string room in SourceTree.Rooms)
        {
            Assert.True(room == "Reports" || !SourceTree.Packages(room).Contains("ScottPlot"), $"{room} must not draw");
            Assert.True(room == "Runs" || !SourceTree.Packages(room).Contains("PureHDF"), $"{room} must not store");
        }
    }

    /// <summary>A scheme knows neither the model that it coarse-grains nor that symmetry exists.</summary>
    [Fact]
    public void Schemes_do_not_name_groups_or_models()
    {
        foreach (string file in SourceTree.Files("src/TensorRG.CoarseGraining").Where(static f => f.Count(static c => c == '/') > 2))
            Assert.All(SourceTree.Lines(file), line => Assert.False(Symmetry().IsMatch(Code(line)), $"{file}: {line.Trim()}"));
    }

    /// <summary>The line without its comment; good enough for code that holds no "//" in strings.</summary>
    private static string Code(string line) => line.IndexOf("//", StringComparison.Ordinal) is int at and >= 0 ? line[..at] : line;

    [GeneratedRegex(@"\b(MatrixView|IKernels|ManagedKernels|PlainKernels|IMicroKernel|AlignedBuffer|BufferPool|StridedCopy|Workers|Gemm|VectorOps)\b|\bnint\b|\.Kernels\.Decompositions\b")]
    private static partial Regex KernelType();

    [GeneratedRegex(@"\bunsafe\b|\bstackalloc\b.*\*|\bfixed\s*\(")]
    private static partial Regex Unsafe();

    [GeneratedRegex(@"\bConsole\.|\bAnsiConsole\b|\bSpectre\b")]
    private static partial Regex Console();

    [GeneratedRegex(@"\bAbelianGroup\b|\bTensorRG\.Models\b")]
    private static partial Regex Symmetry();
}
