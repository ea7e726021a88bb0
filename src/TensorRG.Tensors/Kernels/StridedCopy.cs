using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Copies between two strided arrays of any rank: permute, gather, scatter, slice. Axes that are contiguous on both
/// sides are merged; the two fastest axes, one of the target and one of the source, form planes that are copied by
/// vectors or turned in registers. Nothing is allocated on one thread.
/// </summary>
public static unsafe class StridedCopy
{
    /// <summary>Real numbers below which a second thread costs more than it brings.</summary>
    private const long ThreadingSize = 1 << 16;

    private const int LargestRank = 64;

    /// <summary>
    /// target[sum_a i_a targetStrides_a] = source[sum_a i_a sourceStrides_a] (or its complex conjugate) for all
    /// 0 &lt;= i_a &lt; dims_a. Rank 0 copies one element; a dimension of 0 copies nothing. Source strides of 0 repeat an element.
    /// </summary>
    /// <typeparam name="T"><see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="dims">The extents.</param>
    /// <param name="source">Address of the element with all indices 0.</param>
    /// <param name="sourceStrides">Strides in elements, of any sign.</param>
    /// <param name="target">Address of the element with all indices 0; the target does not overlap the source.</param>
    /// <param name="targetStrides">Strides in elements, of any sign, that never lead two indices to one element.</param>
    /// <param name="conjugate">Whether to conjugate complex elements; without effect on real ones.</param>
    /// <param name="workers">Threads to share large copies; null for the calling thread alone.</param>
    /// <exception cref="ArgumentException">The three lists differ in length, or the rank is above 64.</exception>
    public static void Run<T>(
        ReadOnlySpan<int> dims,
        T* source,
        ReadOnlySpan<nint> sourceStrides,
        T* target,
        ReadOnlySpan<nint> targetStrides,
        bool conjugate,
        Workers? workers = null)
        where T : unmanaged, INumberBase<T>
    {
        if (dims.Length != sourceStrides.Length || dims.Length != targetStrides.Length || dims.Length > LargestRank)
            throw new ArgumentException($"A copy needs one stride per side for each of at most {LargestRank} dimensions; got {dims.Length} dimensions, {sourceStrides.Length} source and {targetStrides.Length} target strides.");
        Span<CopyAxis> axes = stackalloc CopyAxis[dims.Length + 2];
        int rank = Prepare(dims, ref source, sourceStrides, ref target, targetStrides, axes, out long volume);
        if (volume == 0)
            return;
        conjugate &= typeof(T) == typeof(Complex);
        axes = axes[..ChoosePlane(axes, rank)];
        if (workers is { Threads: > 1 } && volume * sizeof(T) / sizeof(double) >= ThreadingSize)
            Share(axes, source, target, conjugate, workers);
        else
            Planes(axes, source, target, conjugate);
    }

    /// <summary>Drops axes of one step, makes target strides positive, sorts by them and merges; returns the rank left.</summary>
    private static int Prepare<T>(
        ReadOnlySpan<int> dims,
        ref T* source,
        ReadOnlySpan<nint> sourceStrides,
        ref T* target,
        ReadOnlySpan<nint> targetStrides,
        Span<CopyAxis> axes,
        out long volume)
        where T : unmanaged
    {
        int rank = 0;
        volume = 1;
        for (int a = 0; a < dims.Length; a++)
        {
            volume *= dims[a];
            if (dims[a] <= 1)
                continue;
            var axis = new CopyAxis(dims[a], sourceStrides[a], targetStrides[a]);
            if (axis.Target < 0)
            {
                source += (axis.Size - 1) * axis.Source;
                target += (axis.Size - 1) * axis.Target;
                axis = new CopyAxis(axis.Size, -axis.Source, -axis.Target);
            }

            Insert(axes, rank++, axis);
        }

        return Merge(axes, rank);
    }

    /// <summary>Keeps the first <paramref name="count"/> axes sorted by target stride and adds one.</summary>
    private static void Insert(Span<CopyAxis> axes, int count, CopyAxis axis)
    {
        int at = count;
        for (; at > 0 && axes[at - 1].Target > axis.Target; at--)
            axes[at] = axes[at - 1];
        axes[at] = axis;
    }

    private static int Merge(Span<CopyAxis> axes, int rank)
    {
        int kept = 0;
        for (int a = 1; a < rank; a++)
        {
            CopyAxis inner = axes[kept], outer = axes[a];
            if (outer.Target == inner.Target * inner.Size && outer.Source == inner.Source * inner.Size)
                axes[kept] = inner with { Size = inner.Size * outer.Size };
            else
                axes[++kept] = outer;
        }

        return Math.Min(rank, kept + 1);
    }

    /// <summary>
    /// Puts the axis of the plane's columns (fastest in the target) first and that of its rows second: the fastest in the
    /// source, or, where the first is already contiguous on both sides, the next in the target. Missing axes get size 1.
    /// </summary>
    private static int ChoosePlane(Span<CopyAxis> axes, int rank)
    {
        for (; rank < 2; rank++)
            axes[rank] = new CopyAxis(1, 1, 1);
        if (axes[0].Source == 1)
            return rank;
        int best = 1;
        for (int a = 2; a < rank; a++)
        {
            if (Math.Abs(axes[a].Source) < Math.Abs(axes[best].Source))
                best = a;
        }

        CopyAxis row = axes[best];
        for (int a = best; a > 1; a--)
            axes[a] = axes[a - 1];
        axes[1] = row;
        return rank;
    }

    private static void Planes<T>(ReadOnlySpan<CopyAxis> axes, T* source, T* target, bool conjugate)
        where T : unmanaged, INumberBase<T>
    {
        CopyAxis columns = axes[0], rows = axes[1];
        ReadOnlySpan<CopyAxis> outer = axes[2..];
        Span<nint> index = stackalloc nint[outer.Length];
        index.Clear();
        while (true)
        {
            Plane(columns, rows, source, target, conjugate);
            int a = 0;
            for (; a < outer.Length; a++)
            {
                source += outer[a].Source;
                target += outer[a].Target;
                if (++index[a] < outer[a].Size)
                    break;
                index[a] = 0;
                source -= outer[a].Source * outer[a].Size;
                target -= outer[a].Target * outer[a].Size;
            }

            if (a == outer.Length)
                return;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Plane<T>(in CopyAxis columns, in CopyAxis rows, T* source, T* target, bool conjugate)
        where T : unmanaged, INumberBase<T>
    {
        if (conjugate)
            ConjugatePlane(columns, rows, (double*)source, (double*)target);
        else if (columns.Target == 1)
            PanelCopy.Run(source, rows.Source, columns.Source, rows.Size, columns.Size, target, rows.Target);
        else
            ScatterPlane(columns, rows, source, target);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ScatterPlane<T>(in CopyAxis columns, in CopyAxis rows, T* source, T* target)
        where T : unmanaged
    {
        for (nint i = rows.Size; i > 0; i--, source += rows.Source, target += rows.Target)
        {
            T* from = source, to = target;
            for (nint j = columns.Size; j > 0; j--, from += columns.Source, to += columns.Target)
                *to = *from;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ConjugatePlane(in CopyAxis columns, in CopyAxis rows, double* source, double* target)
    {
        Vector128<double> sign = Vector128.Create(0.0, -0.0);
        for (nint i = rows.Size; i > 0; i--, source += 2 * rows.Source, target += 2 * rows.Target)
        {
            double* from = source, to = target;
            for (nint j = columns.Size; j > 0; j--, from += 2 * columns.Source, to += 2 * columns.Target)
                (Vector128.Load(from) ^ sign).Store(to);
        }
    }

    /// <summary>Cuts the longest loop outside the columns, or the columns themselves if they are alone.</summary>
    private static void Share<T>(ReadOnlySpan<CopyAxis> axes, T* source, T* target, bool conjugate, Workers workers)
        where T : unmanaged, INumberBase<T>
    {
        int cut = axes.Length - 1;
        for (int a = cut - 1; a >= 0; a--)
        {
            if (axes[a].Size > axes[cut].Size && axes[cut].Size < 8 * workers.Threads)
                cut = a;
        }

        CopyAxis[] shared = axes.ToArray();
        nint parts = Math.Min(4 * workers.Threads, shared[cut].Size);
        workers.Run((int)parts, part =>
        {
            nint size = shared[cut].Size, start = size * part / parts, end = size * (part + 1) / parts;
            Span<CopyAxis> mine = stackalloc CopyAxis[shared.Length];
            shared.CopyTo(mine);
            mine[cut] = mine[cut] with { Size = end - start };
            Planes(mine, source + (start * mine[cut].Source), target + (start * mine[cut].Target), conjugate);
        });
    }
}
