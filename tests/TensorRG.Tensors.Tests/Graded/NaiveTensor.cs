using System.Numerics;

namespace TensorRG.Tensors.Tests.Graded;

/// <summary>
/// The oracle: a full dense row-major array that knows nothing of charges, read element by element from a graded tensor,
/// with contraction by plain loops over all indices.
/// </summary>
internal sealed class NaiveTensor<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly T[] _values;

    private NaiveTensor(int[] dimensions, T[] values)
    {
        Dimensions = dimensions;
        _values = values;
    }

    public int[] Dimensions { get; }

    public IEnumerable<int[]> Positions => Indices(Dimensions);

    public T this[ReadOnlySpan<int> position] => _values[Offset(position)];

    public static NaiveTensor<T> From(int[] dimensions, Func<int[], T> element)
        => new(dimensions, [.. Indices(dimensions).Select(element)]);

    public static NaiveTensor<T> Of(Tensor<T> tensor)
        => From([.. tensor.Legs.Select(static leg => leg.Dimension)], p => tensor.At(p));

    /// <summary>Free indices of a, then those of b.</summary>
    public static NaiveTensor<T> Contract(NaiveTensor<T> a, int[] axesA, NaiveTensor<T> b, int[] axesB)
    {
        int[] freeA = a.Free(axesA), freeB = b.Free(axesB);
        int[] inner = [.. axesA.Select(axis => a.Dimensions[axis])];
        return From(
            [.. freeA.Select(axis => a.Dimensions[axis]), .. freeB.Select(axis => b.Dimensions[axis])],
            free =>
            {
                var sum = T.Zero;
                int[] pa = new int[a.Dimensions.Length], pb = new int[b.Dimensions.Length];
                Put(free.AsSpan(0, freeA.Length), freeA, pa);
                Put(free.AsSpan(freeA.Length), freeB, pb);
                foreach (int[] summed in Indices(inner))
                {
                    Put(summed, axesA, pa);
                    Put(summed, axesB, pb);
                    sum += a[pa] * b[pb];
                }

                return sum;
            });
    }

    public NaiveTensor<T> Trace(int[] first, int[] second)
    {
        int[] free = Free([.. first, .. second]);
        int[] inner = [.. first.Select(axis => Dimensions[axis])];
        return From(
            [.. free.Select(axis => Dimensions[axis])],
            outer =>
            {
                var sum = T.Zero;
                int[] position = new int[Dimensions.Length];
                Put(outer, free, position);
                foreach (int[] summed in Indices(inner))
                {
                    Put(summed, first, position);
                    Put(summed, second, position);
                    sum += this[position];
                }

                return sum;
            });
    }

    public NaiveTensor<T> Permute(int[] order)
        => From(
            [.. order.Select(axis => Dimensions[axis])],
            p =>
            {
                int[] source = new int[order.Length];
                Put(p, order, source);
                return this[source];
            });

    public NaiveTensor<T> Map(Func<int[], T, T> f) => From(Dimensions, p => f(p, this[p]));

    public double Norm() => Math.Sqrt(_values.Sum(Scalar.SquaredMagnitude));

    /// <summary>Largest difference of any element; the shapes must agree.</summary>
    public double Distance(NaiveTensor<T> other)
    {
        Assert.Equal(Dimensions, other.Dimensions);
        return _values.Zip(other._values, static (x, y) => Scalar.Magnitude(x - y)).DefaultIfEmpty(0).Aggregate(0.0, Math.Max);
    }

    private static IEnumerable<int[]> Indices(int[] dimensions)
    {
        if (dimensions.Contains(0))
            yield break;
        int[] position = new int[dimensions.Length];
        while (true)
        {
            yield return [.. position];
            int axis = dimensions.Length - 1;
            while (axis >= 0 && ++position[axis] == dimensions[axis])
                position[axis--] = 0;
            if (axis < 0)
                yield break;
        }
    }

    private static void Put(ReadOnlySpan<int> values, int[] axes, int[] position)
    {
        for (int i = 0; i < axes.Length; i++)
            position[axes[i]] = values[i];
    }

    private int[] Free(int[] taken) => [.. Enumerable.Range(0, Dimensions.Length).Where(axis => !taken.Contains(axis))];

    private int Offset(ReadOnlySpan<int> position)
    {
        int at = 0;
        for (int axis = 0; axis < position.Length; axis++)
            at = (at * Dimensions[axis]) + position[axis];
        return at;
    }
}
