using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// A pinned block of elements, aligned to 64 bytes, taken from <see cref="BufferPool"/>. Returning it with
/// <see cref="Dispose"/> lets the next request reuse warm memory; a buffer that is never disposed is collected like any
/// other object.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed unsafe class AlignedBuffer<T> : IDisposable
    where T : unmanaged
{
    private readonly byte[] _block;
    private T* _data;

    internal AlignedBuffer(byte[] block, long length)
    {
        _block = block;
        Length = length;
        byte* start = (byte*)Unsafe.AsPointer(ref block[0]);
        _data = (T*)(start + (-(nint)start & (BufferPool.Alignment - 1)));
    }

    /// <summary>Number of elements.</summary>
    public long Length { get; }

    /// <summary>Address of element 0, valid until <see cref="Dispose"/>.</summary>
    /// <exception cref="ObjectDisposedException">The buffer was given back.</exception>
    public T* Data
    {
        get
        {
            ObjectDisposedException.ThrowIf(_data is null, this);
            return _data;
        }
    }

    /// <summary>The elements as a span.</summary>
    public Span<T> Span => new(Data, checked((int)Length));

    /// <summary>Gives the memory back to the pool; further use throws. Safe to call twice.</summary>
    public void Dispose()
    {
        if (_data is null)
            return;
        _data = null;
        BufferPool.Return(_block);
    }
}
