namespace TensorRG.Boundary;

/// <summary>How far a search has come.</summary>
/// <param name="BondDimension">States on the bond at present.</param>
/// <param name="Iteration">Rounds since the bond last changed.</param>
/// <param name="Residual">The larger of |AC - AL C| and |AC - C AR|.</param>
/// <param name="Applications">Products of a map with a vector so far, of this fixed point.</param>
public readonly record struct BoundaryProgress(int BondDimension, int Iteration, double Residual, int Applications);
