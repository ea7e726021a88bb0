namespace TensorRG.Cli.Output;

/// <summary>How much a command prints.</summary>
internal enum OutputMode
{
    /// <summary>Steps and summary.</summary>
    Full,

    /// <summary>The summary alone.</summary>
    Quiet,

    /// <summary>One JSON object alone.</summary>
    Json,
}
