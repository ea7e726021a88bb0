namespace TensorRG.Tensors.Kernels;

/// <summary>
/// The innermost product of one instruction path: a tile of C as sums over k of A[i, k] B[k, j]. Each element is one chain of fused
/// multiply-adds in ascending k that starts from +0, on every path, which is why all paths give the same bits.
/// </summary>
internal unsafe interface IMicroKernel
{
    /// <summary>Rows of the full tile, an even number.</summary>
    static abstract int Rows { get; }

    /// <summary>Real numbers in one vector.</summary>
    static abstract int Lanes { get; }

    /// <summary>Vectors in a row of the full tile.</summary>
    static abstract int Vectors { get; }

    /// <summary>Vectors in a row of the tile for at most two rows, where the full tile would leave the units idle.</summary>
    static abstract int WideVectors { get; }

    /// <summary>C = A B or C += A B on one tile.</summary>
    /// <param name="rows">1 .. <see cref="Rows"/>.</param>
    /// <param name="vectors">1 .. <see cref="Vectors"/>, or <see cref="WideVectors"/> with at most two rows.</param>
    /// <param name="call">Depth, strides and whether to accumulate.</param>
    /// <param name="a">First element of the tile of A.</param>
    /// <param name="b">First element of the tile of B.</param>
    /// <param name="c">First element of the tile of C.</param>
    static abstract void Run(int rows, int vectors, in TileCall call, double* a, double* b, double* c);
}
