using System.Collections.Concurrent;
using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Pinned blocks kept for reuse by size class (eighths of a power of two). Fresh large arrays cost page faults that amount to a
/// quarter of a medium matrix product; the pool removes them. Thread-safe.
/// </summary>
public static class BufferPool
{
    /// <summary>Every buffer starts at a multiple of this many bytes.</summary>
    public const int Alignment = 64;

    private const long LargestKeptBytes = 1L << 28;
    private const long MostKeptBytes = 1L << 29;

    private static readonly ConcurrentDictionary<int, ConcurrentBag<byte[]>> Kept = new();
    private static long keptBytes;

    /// <summary>A buffer of at least 1 element whose contents are undefined.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="length">Number of elements, at least 0.</param>
    /// <exception cref="InsufficientMemoryException">The buffer is larger than one array can be (2 GiB).</exception>
    public static unsafe AlignedBuffer<T> Rent<T>(long length)
        where T : unmanaged
    {
        ArgumentOutOfRangeException.ThrowIfNegative(length);
        long bytes = (Math.Max(length, 1) * sizeof(T)) + Alignment;
        int size = SizeClass(bytes);
        if (Kept.TryGetValue(size, out ConcurrentBag<byte[]>? bag) && bag.TryTake(out byte[]? block))
        {
            Interlocked.Add(ref keptBytes, -block.LongLength);
            return new AlignedBuffer<T>(block, length);
        }

        return new AlignedBuffer<T>(GC.AllocateUninitializedArray<byte>(size, pinned: true), length);
    }

    /// <summary>A buffer filled with zeros.</summary>
    /// <typeparam name="T">Element type.</typeparam>
    /// <param name="length">Number of elements, at least 0.</param>
    public static unsafe AlignedBuffer<T> RentZeroed<T>(long length)
        where T : unmanaged
    {
        AlignedBuffer<T> buffer = Rent<T>(length);
        System.Runtime.InteropServices.NativeMemory.Clear(buffer.Data, (nuint)(length * sizeof(T)));
        return buffer;
    }

    internal static void Return(byte[] block)
    {
        if (block.LongLength > LargestKeptBytes || Interlocked.Read(ref keptBytes) + block.LongLength > MostKeptBytes)
            return;
        Interlocked.Add(ref keptBytes, block.LongLength);
        Kept.GetOrAdd(block.Length, static _ => []).Add(block);
    }

    private static int SizeClass(long bytes)
    {
        if (bytes > Array.MaxLength)
            throw new InsufficientMemoryException($"A tensor block of {bytes} bytes exceeds the {Array.MaxLength} bytes one array can hold; lower the bond dimension.");
        // Eighths of a power of two: at most an eighth of a block lies idle.
        long grain = Math.Max(1024, (long)BitOperations.RoundUpToPowerOf2((ulong)bytes) / 16);
        return (int)Math.Min((bytes + grain - 1) / grain * grain, Array.MaxLength);
    }
}
