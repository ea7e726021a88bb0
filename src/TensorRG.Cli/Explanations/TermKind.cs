namespace TensorRG.Cli.Explanations;

/// <summary>What the values of a table are.</summary>
internal enum TermKind
{
    /// <summary>Energies E; the weight is exp(-E/T).</summary>
    Energy,

    /// <summary>Weights.</summary>
    Weight,

    /// <summary>Factors of the weight beside exp(-E/T).</summary>
    Factor,
}
