namespace TensorRG.Runs;

/// <summary>What kind of thing is wrong with a run folder, so that a caller can choose an exit code.</summary>
public enum RunStoreProblem
{
    /// <summary>Reading or writing failed: full disk, read-only or missing folder, no permission, broken device.</summary>
    Storage,

    /// <summary>The path is not a run folder, or a run cannot be made there.</summary>
    NotARun,

    /// <summary>A file of the run was altered, truncated or belongs elsewhere.</summary>
    Damaged,

    /// <summary>Another process works on the run.</summary>
    InUse,

    /// <summary>The folder holds a run of other inputs.</summary>
    OtherInputs,

    /// <summary>The run was written by another version whose format or numerics this one does not have.</summary>
    OtherVersion,
}
