using System.Collections.Immutable;

namespace TensorRG.Models.Files;

/// <summary>An observable as the file declares it.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Meaning">What it is.</param>
/// <param name="Unit">Its unit in words.</param>
/// <param name="Terms">Its terms.</param>
/// <param name="IsStaggered">True if its terms alternate in sign.</param>
/// <param name="IsOrder">True if it tells the ordered phases apart.</param>
internal sealed record FileObservable(string Name, string Meaning, string Unit, ImmutableArray<LocalTerm> Terms, bool IsStaggered, bool IsOrder);
