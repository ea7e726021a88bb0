namespace TensorRG.Tensors.Kernels;

/// <summary>The packing space of one thread, kept from product to product so that small ones allocate nothing.</summary>
internal sealed unsafe class GemmScratch
{
    /// <summary>Room for the largest tile of any path: 8 x 24 or 2 x 48 real numbers.</summary>
    private const int TileLength = 192;

    [ThreadStatic]
    private static GemmScratch? current;

    private readonly AlignedBuffer<double> _tile = BufferPool.Rent<double>(TileLength);
    private AlignedBuffer<double> _left = BufferPool.Rent<double>(1024);
    private AlignedBuffer<double> _right = BufferPool.Rent<double>(4096);

    /// <summary>The scratch of the calling thread.</summary>
    internal static GemmScratch Current => current ??= new GemmScratch();

    /// <summary>Space for one tile of C.</summary>
    internal double* Tile => _tile.Data;

    /// <summary>Space for packed A.</summary>
    /// <param name="length">Real numbers needed.</param>
    internal double* Left(long length) => Grow(ref _left, length);

    /// <summary>Space for packed B.</summary>
    /// <param name="length">Real numbers needed.</param>
    internal double* Right(long length) => Grow(ref _right, length);

    private static double* Grow(ref AlignedBuffer<double> buffer, long length)
    {
        if (buffer.Length < length)
        {
            buffer.Dispose();
            buffer = BufferPool.Rent<double>(length);
        }

        return buffer.Data;
    }
}
