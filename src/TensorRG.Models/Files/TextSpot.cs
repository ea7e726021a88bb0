namespace TensorRG.Models.Files;

/// <summary>Where a piece of text stands in a file.</summary>
/// <param name="Source">The file.</param>
/// <param name="Start">Offset of its first character.</param>
/// <param name="IsExact">False where escapes make offsets inside the piece unknown: errors then point to its start.</param>
internal sealed record TextSpot(SourceText Source, int Start, bool IsExact)
{
    /// <summary>An error inside the piece.</summary>
    /// <param name="offset">Offset in the piece.</param>
    /// <param name="message">What is wrong, and the remedy.</param>
    public ModelFileException Error(int offset, string message) => Source.Error(IsExact ? Start + offset : Start, message);
}
