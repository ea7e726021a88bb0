namespace TensorRG.Tensors.Kernels;

/// <summary>
/// What all tiles of one block have in common; strides count real numbers. Row r of the tile of A starts at
/// (r / 2) APair + (r % 2) AOdd: for real matrices AOdd is the row stride and APair twice that; for complex ones row 2i
/// is the real and row 2i + 1 the imaginary part of row i, so AOdd is 1.
/// </summary>
internal struct TileCall
{
    /// <summary>Terms of the sum.</summary>
    internal nint Depth;

    /// <summary>Distance from a row of A to the second next.</summary>
    internal nint APair;

    /// <summary>Distance from an even row of A to the next.</summary>
    internal nint AOdd;

    /// <summary>Distance along the sum in A.</summary>
    internal nint AStep;

    /// <summary>Distance along the sum in B, whose columns are contiguous.</summary>
    internal nint BStep;

    /// <summary>Row stride of C, whose columns are contiguous.</summary>
    internal nint CRow;

    /// <summary>Whether the finished sum is added to C instead of overwriting it.</summary>
    internal bool Accumulate;
}
