using System.Numerics;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors;

/// <summary>
/// Contractions and norms of graded tensors, on the kernels of one backend. Axes are counted from 0 in the order of
/// <see cref="Tensor{T}.Legs"/>. No operation changes its arguments.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="backend">Where the dense linear algebra runs.</param>
public sealed class TensorAlgebra<T>(Backend backend)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The dense kernels in use.</summary>
    public IKernels<T> Kernels { get; } = backend.For<T>();

    /// <summary>
    /// Sum over pairs of legs. The result carries the remaining legs of <paramref name="a"/>, then those of
    /// <paramref name="b"/>, in their order; its flux is the sum of both. Nothing is conjugated.
    /// </summary>
    /// <param name="a">Left tensor.</param>
    /// <param name="axesA">Axes of the left tensor to sum over.</param>
    /// <param name="b">Right tensor.</param>
    /// <param name="axesB">Axes of the right tensor, the i-th paired with the i-th of <paramref name="axesA"/>.</param>
    /// <exception cref="ArgumentException">The legs of a pair do not match.</exception>
    public unsafe Tensor<T> Contract(Tensor<T> a, ReadOnlySpan<int> axesA, Tensor<T> b, ReadOnlySpan<int> axesB)
    {
        CheckPairs(a, axesA, b, axesB);
        int[] freeA = Axes.Others(a.Rank, axesA), freeB = Axes.Others(b.Rank, axesB);
        using BlockMatrix<T> left = BlockMatrix<T>.From(a, freeA, axesA);
        using BlockMatrix<T> right = BlockMatrix<T>.From(b, axesB, freeB);
        AbelianGroup group = a.Rank > 0 ? left.Rows.Group : right.Rows.Group; // A number has no legs that name its group.
        Charge flux = group.Add(a.Flux, b.Flux);
        Tensor<T> result = Tensor<T>.Allocate([.. left.Rows.Legs, .. right.Columns.Legs], flux, clear: false);
        Span<int> sectors = stackalloc int[result.Rank];
        foreach (FusedSpace.Part row in left.Rows.Parts)
        {
            FusedSpace.Part? column = right.Columns.Find(group.Subtract(flux, row.Charge));
            if (column is null)
                continue;
            Charge inner = group.Negate(left.ColumnCharge(row.Charge));
            bool empty = !left.Contains(row.Charge) || !right.Contains(inner);
            for (int r = 0; r < row.Count; r++)
            {
                for (int c = 0; c < column.Count; c++)
                {
                    row.Sectors(r).CopyTo(sectors);
                    column.Sectors(c).CopyTo(sectors[row.Sectors(r).Length..]);
                    T* target = result.Data + result.Layout.Offset(result.Layout.Find(sectors));
                    var product = new MatrixView<T>(target, row.Size(r), column.Size(c));
                    if (empty)
                    {
                        new Span<T>(target, checked(product.Rows * product.Columns)).Clear();
                        continue;
                    }

                    MatrixView<T> x = left[row.Charge], y = right[inner];
                    Kernels.Multiply(
                        x.Slice(row.Offset(r), 0, row.Size(r), x.Columns),
                        y.Slice(0, column.Offset(c), y.Rows, column.Size(c)),
                        product,
                        accumulate: false);
                }
            }
        }

        GC.KeepAlive(a);
        GC.KeepAlive(b);
        return result;
    }

    /// <summary>
    /// R[p, n, x] = sum over k, l of M[n, k, l] Y[p, k, l, x]: a sum over the middle legs of a block of vectors, without moving its elements.
    /// </summary>
    /// <param name="m">Three legs n, k, l.</param>
    /// <param name="y">Four legs p, k, l, x; the middle two match those of <paramref name="m"/>.</param>
    /// <exception cref="ArgumentException">The legs do not match, or the tensors have other ranks.</exception>
    public Tensor<T> ContractMiddle(Tensor<T> m, Tensor<T> y)
    {
        ArgumentNullException.ThrowIfNull(m);
        ArgumentNullException.ThrowIfNull(y);
        if (m.Rank != 3 || y.Rank != 4)
            throw new ArgumentException("The middle contraction takes tensors of three and four legs.", nameof(m));
        CheckPairs(m, [1, 2], y, [1, 2]);
        Charge flux = m.Legs[0].Group.Add(m.Flux, y.Flux);
        Tensor<T> result = Tensor<T>.Allocate([y.Legs[0], m.Legs[0], y.Legs[3]], flux, clear: false);
        for (int block = 0; block < result.Layout.Count; block++)
            MiddleContraction.Fill(Kernels, m, y, result, block);
        GC.KeepAlive(m);
        GC.KeepAlive(y);
        return result;
    }

    /// <summary>Frobenius norm: the square root of the sum of |element|^2, safe against overflow and underflow.</summary>
    /// <param name="a">Any tensor.</param>
    public static double Norm(Tensor<T> a)
    {
        ArgumentNullException.ThrowIfNull(a);
        double largest = LargestMagnitude(a);
        if (largest == 0 || !double.IsFinite(largest))
            return largest;
        double sum = 0;
        double inverse = 1 / largest;
        if (double.IsInfinity(inverse))
        {
            using Tensor<T> lifted = Scale(a, Scalar.FromReal<T>(Math.ScaleB(1, 600)));
            return Math.ScaleB(Norm(lifted), -600);
        }

        foreach (T x in a.Elements)
            sum += Scalar.SquaredMagnitude(x * Scalar.FromReal<T>(inverse));
        return largest * Math.Sqrt(sum);
    }

    /// <summary>The largest |element|; 0 for an empty tensor; NaN if any element is NaN.</summary>
    /// <param name="a">Any tensor.</param>
    public static double LargestMagnitude(Tensor<T> a)
    {
        ArgumentNullException.ThrowIfNull(a);
        double largest = 0;
        foreach (T x in a.Elements)
            largest = Math.Max(largest, Scalar.Magnitude(x));
        return largest;
    }

    /// <summary>The tensor with every element multiplied by a number.</summary>
    /// <param name="a">Any tensor.</param>
    /// <param name="factor">The number.</param>
    public static Tensor<T> Scale(Tensor<T> a, T factor)
    {
        ArgumentNullException.ThrowIfNull(a);
        Tensor<T> result = Tensor<T>.Allocate(a.Legs, a.Flux, clear: false);
        ReadOnlySpan<T> source = a.Elements;
        Span<T> target = result.Elements;
        for (int i = 0; i < source.Length; i++)
            target[i] = source[i] * factor;
        return result;
    }

    /// <summary>The tensor with one leg multiplied by a diagonal matrix.</summary>
    /// <param name="a">Any tensor.</param>
    /// <param name="axis">The leg.</param>
    /// <param name="weights">A diagonal matrix with the sectors of that leg.</param>
    /// <exception cref="ArgumentException">The sectors differ.</exception>
    public static Tensor<T> ScaleLeg(Tensor<T> a, int axis, BondWeights weights)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(weights);
        if (!a.Legs[axis].Equals(weights.Leg) && !a.Legs[axis].Matches(weights.Leg))
            throw new ArgumentException($"Weights on {weights.Leg} do not fit leg {axis} ({a.Legs[axis]}).", nameof(weights));
        Tensor<T> result = a.Clone();
        for (int block = 0; block < result.Layout.Count; block++)
        {
            ReadOnlySpan<int> dimensions = result.Layout.Dimensions(block);
            int inner = 1;
            foreach (int dimension in dimensions[(axis + 1)..])
                inner *= dimension;
            Span<T> elements = result.Elements.Slice(checked((int)result.Layout.Offset(block)), checked((int)result.Layout.Size(block)));
            double[] values = weights.Values[result.Layout.Sectors(block)[axis]];
            for (int start = 0, i = 0; start < elements.Length; start += inner, i = i + 1 == values.Length ? 0 : i + 1)
            {
                T factor = Scalar.FromReal<T>(values[i]);
                foreach (ref T x in elements.Slice(start, inner))
                    x *= factor;
            }
        }

        return result;
    }

    /// <summary>a + factor b, for tensors with equal legs and flux.</summary>
    /// <param name="a">First tensor.</param>
    /// <param name="b">Second tensor.</param>
    /// <param name="factor">Multiplies the second tensor.</param>
    /// <exception cref="ArgumentException">The legs or the flux differ.</exception>
    public static Tensor<T> Add(Tensor<T> a, Tensor<T> b, T factor)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(b);
        if (!a.Legs.SequenceEqual(b.Legs) || a.Flux != b.Flux)
            throw new ArgumentException($"Tensors with legs {a} and {b} cannot be added.", nameof(b));
        Tensor<T> result = a.Clone();
        ReadOnlySpan<T> source = b.Elements;
        Span<T> target = result.Elements;
        for (int i = 0; i < source.Length; i++)
            target[i] += source[i] * factor;
        return result;
    }

    /// <summary>
    /// Sum over pairs of legs of one tensor: the trace of the matrix between them. The other legs remain, in order.
    /// </summary>
    /// <param name="a">Any tensor.</param>
    /// <param name="first">One axis of each pair.</param>
    /// <param name="second">The other axis of each pair.</param>
    /// <exception cref="ArgumentException">The legs of a pair do not match.</exception>
    public static Tensor<T> Trace(Tensor<T> a, ReadOnlySpan<int> first, ReadOnlySpan<int> second)
    {
        CheckPairs(a, first, a, second);
        int[] free = Axes.Others(a.Rank, [.. first, .. second]);
        Tensor<T> result = Tensor<T>.Zeros(free.Select(axis => a.Legs[axis]), a.Flux);
        for (int block = 0; block < a.Layout.Count; block++)
            TensorTrace.AddBlock(a, block, first, second, free, result);
        GC.KeepAlive(a);
        return result;
    }

    private static void CheckPairs(Tensor<T> a, ReadOnlySpan<int> axesA, Tensor<T> b, ReadOnlySpan<int> axesB)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(b);
        if (axesA.Length != axesB.Length)
            throw new ArgumentException($"{axesA.Length} axes cannot be paired with {axesB.Length}.", nameof(axesB));
        for (int i = 0; i < axesA.Length; i++)
        {
            if (!a.Legs[axesA[i]].Matches(b.Legs[axesB[i]]))
                throw new ArgumentException($"Leg {axesA[i]} ({a.Legs[axesA[i]]}) cannot be contracted with leg {axesB[i]} ({b.Legs[axesB[i]]}).", nameof(axesB));
        }
    }
}
