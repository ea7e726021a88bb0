namespace TensorRG.Runs.Tests;

/// <summary>What is still there after the end.</summary>
public enum CrashKind
{
    /// <summary>The process was killed: everything it handed to the operating system is there.</summary>
    Kill,

    /// <summary>Power cut: only flushed content under flushed names is there.</summary>
    PowerCut,

    /// <summary>Power cut where the names reached the disk at once, but the content only when flushed.</summary>
    PowerCutAfterNames,
}
