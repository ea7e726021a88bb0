namespace TensorRG.Tensors.Kernels;

/// <summary>
/// What all tiles of one block have in common; strides count real numbers. Row r of the tile of A starts at
/// (r / 2) APair + (r % 2) AOdd: for real matrices AOdd is the row stride and APair twice that; for complex ones row 2i is the real
/// and row 2i + 1 the imaginary part of row i, so AOdd is 1.
/// </summary>
/// <param name="Depth">Terms of the sum.</param>
/// <param name="APair">Distance from a row of A to the second next.</param>
/// <param name="AOdd">Distance from an even row of A to the next.</param>
/// <param name="AStep">Distance along the sum in A.</param>
/// <param name="BStep">Distance along the sum in B, whose columns are contiguous.</param>
/// <param name="CRow">Row stride of C, whose columns are contiguous.</param>
/// <param name="Accumulate">Whether the finished sum is added to C instead of overwriting it.</param>
internal readonly record struct TileCall(
    nint Depth, nint APair, nint AOdd, nint AStep, nint BStep, nint CRow, bool Accumulate);
