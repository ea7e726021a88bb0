using System.Collections.Immutable;

namespace TensorRG.Models;

/// <summary>
/// A name that sets several parameters to one value, such as J for Jx and Jy. It is no parameter itself and is not
/// stored: a <see cref="ParameterSet"/> holds the parameters that it set.
/// </summary>
/// <param name="Name">Name by which it is set.</param>
/// <param name="Targets">Names of the parameters that it sets.</param>
/// <param name="Meaning">What it means, in one line.</param>
public sealed record ParameterShorthand(string Name, ImmutableArray<string> Targets, string Meaning);
