using System.Collections.Immutable;

namespace TensorRG.Models.Files;

/// <summary>A variable of a site, or the one of an edge.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Node">Its value in the file.</param>
/// <param name="Values">Its values at given parameters.</param>
internal sealed record SiteVariable(string Name, Node Node, Func<Workspace, ImmutableArray<StateValue>> Values);
