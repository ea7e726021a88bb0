namespace TensorRG.Runs;

/// <summary>The version of the layout of a run folder.</summary>
internal static class RunSchema
{
    /// <summary>The version this program writes. A higher one in a folder is refused.</summary>
    public const int Current = 1;
}
