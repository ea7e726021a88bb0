using System.Collections.Immutable;
using System.Text.Json.Nodes;

namespace TensorRG.Runs;

/// <summary>
/// Everything that determines the numbers of a run, and nothing else: no threads, folder, machine or time. Equal
/// inputs have equal <see cref="Identity"/> and give the same bits.
/// </summary>
/// <remarks>
/// The number of steps belongs to the identity: it decides result.json. Going on further than a finished run is a new
/// run in a new folder.
/// </remarks>
public sealed record RunInputs
{
    private readonly ImmutableSortedDictionary<string, InputValue> _parameters = Empty;
    private readonly ImmutableSortedDictionary<string, InputValue> _schemeOptions = Empty;

    /// <summary>No parameters, ordered ordinally.</summary>
    public static ImmutableSortedDictionary<string, InputValue> Empty { get; } =
        ImmutableSortedDictionary.Create<string, InputValue>(StringComparer.Ordinal);

    /// <summary>Name of the model.</summary>
    public required string Model { get; init; }

    /// <summary>Parameters of the model by name, temperature among them.</summary>
    public ImmutableSortedDictionary<string, InputValue> Parameters
    {
        get => _parameters;
        init => _parameters = value.WithComparers(StringComparer.Ordinal);
    }

    /// <summary>Text of the model's file; null for a model of the catalogue. The run can be resumed when the file has gone.</summary>
    public string? Definition { get; init; }

    /// <summary>Form of the network where it was chosen by hand; null where the tool chose.</summary>
    public string? NetworkForm { get; init; }

    /// <summary>Name of the coarse-graining scheme.</summary>
    public required string Scheme { get; init; }

    /// <summary>Options of the scheme by name, such as the exponent of bond weights.</summary>
    public ImmutableSortedDictionary<string, InputValue> SchemeOptions
    {
        get => _schemeOptions;
        init => _schemeOptions = value.WithComparers(StringComparer.Ordinal);
    }

    /// <summary>Largest number of states kept on a bond, at least 1.</summary>
    public required int BondDimension { get; init; }

    /// <summary>Number of coarse-graining steps, at least 0.</summary>
    public required int Steps { get; init; }

    /// <summary>Seed of the random numbers.</summary>
    public required long Seed { get; init; }

    /// <summary>
    /// Relative gap below which neighbouring singular values count as one multiplet that is never cut; 0 lets the cut
    /// fall anywhere.
    /// </summary>
    public required double MultipletGap { get; init; }

    /// <summary>Whether the symmetry of the model grades the tensors.</summary>
    public required bool Graded { get; init; }

    /// <summary>Element type of the tensors: <c>double</c> or <c>complex</c>.</summary>
    public required string ElementType { get; init; }

    /// <summary>Name of the linear-algebra backend.</summary>
    public required string Backend { get; init; }

    /// <summary>Version of the algorithms, raised whenever a change alters a bit of any result.</summary>
    public required int NumericsVersion { get; init; }

    /// <summary>
    /// SHA-256 of the canonical JSON of the inputs (keys sorted by code point, shortest round-trip reals with a point),
    /// as 64 lower-case hexadecimal digits. From Python, with <c>run.json</c> loaded as <c>r</c>:
    /// <c>hashlib.sha256(json.dumps(r["inputs"], sort_keys=True, separators=(",", ":"), ensure_ascii=False).encode()).hexdigest()</c>.
    /// </summary>
    public string Identity => CanonicalJson.Hash(RunInputsJson.Write(this));

    /// <summary>Whether both have the same identity.</summary>
    /// <param name="other">The inputs to compare with.</param>
    public bool Equals(RunInputs? other) => other is not null && Identity == other.Identity;

    /// <inheritdoc/>
    public override int GetHashCode() => Identity.GetHashCode(StringComparison.Ordinal);

    /// <summary>Checks what a run cannot be identified without.</summary>
    /// <exception cref="ArgumentException">A name is empty, a number is out of its range or not finite.</exception>
    internal void Validate()
    {
        ArgumentException.ThrowIfNullOrEmpty(Model);
        ArgumentException.ThrowIfNullOrEmpty(Scheme);
        ArgumentException.ThrowIfNullOrEmpty(ElementType);
        ArgumentException.ThrowIfNullOrEmpty(Backend);
        ArgumentOutOfRangeException.ThrowIfLessThan(BondDimension, 1);
        ArgumentOutOfRangeException.ThrowIfNegative(Steps);
        if (!(MultipletGap >= 0 && double.IsFinite(MultipletGap)))
            throw new ArgumentException("The multiplet gap must be finite and at least 0.");
        JsonObject json = RunInputsJson.Write(this);
        _ = CanonicalJson.Compact(json);
    }
}
