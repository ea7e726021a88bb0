namespace TensorRG.Runs;

/// <summary>How a call of <see cref="RunDriver.Run"/> ended.</summary>
public enum RunStatus
{
    /// <summary>All steps are done and the result is stored.</summary>
    Completed,

    /// <summary>Stopped on demand; the state is stored, and another call goes on from it.</summary>
    Stopped,
}
