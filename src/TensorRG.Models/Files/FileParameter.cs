using System.Collections.Immutable;

namespace TensorRG.Models.Files;

/// <summary>A parameter as the file declares it.</summary>
/// <param name="Name">Its name in expressions.</param>
/// <param name="Start">Offset of its key.</param>
/// <param name="Definitions">One real parameter, or the real and the imaginary part.</param>
/// <param name="Shorthand">A name that sets it together with others, or null.</param>
internal sealed record FileParameter(string Name, int Start, ImmutableArray<ParameterDefinition> Definitions, string? Shorthand)
{
    /// <summary>Name of the temperature in a file.</summary>
    public const string Temperature = "T";

    /// <summary>True if it has two parts.</summary>
    public bool IsComplex => Definitions.Length == 2;
}
