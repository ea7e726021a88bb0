namespace TensorRG.Cli;

/// <summary>What the process tells whoever started it.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>The computation failed.</summary>
    public const int Failed = 1;

    /// <summary>Bad input or usage.</summary>
    public const int BadInput = 2;

    /// <summary>Stopped on demand; <c>tensorrg resume</c> goes on.</summary>
    public const int Stopped = 3;
}
