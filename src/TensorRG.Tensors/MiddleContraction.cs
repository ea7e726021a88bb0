using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors;

/// <summary>One block of <see cref="TensorAlgebra{T}.ContractMiddle"/>: for each state p a product of matrices that lie in memory as they are.</summary>
internal static unsafe class MiddleContraction
{
    public static void Fill<T>(IKernels<T> kernels, Tensor<T> m, Tensor<T> y, Tensor<T> result, int block)
        where T : unmanaged, INumberBase<T>
    {
        ReadOnlySpan<int> target = result.Layout.Sectors(block), extents = result.Layout.Dimensions(block);
        (int p, int n, int x) = (extents[0], extents[1], extents[2]);
        var c = new MatrixView<T>(result.Data + result.Layout.Offset(block), n, x);
        bool accumulate = false;
        for (int k = 0; k < m.Legs[1].Sectors.Length; k++)
        {
            for (int l = 0; l < m.Legs[2].Sectors.Length; l++)
            {
                int left = m.Layout.Find([target[1], k, l]), right = y.Layout.Find([target[0], k, l, target[2]]);
                if (left < 0 || right < 0)
                    continue;
                int inner = m.Legs[1].Sectors[k].Dimension * m.Legs[2].Sectors[l].Dimension;
                var a = new MatrixView<T>(m.Data + m.Layout.Offset(left), n, inner);
                var b = new MatrixView<T>(y.Data + y.Layout.Offset(right), inner, x);
                kernels.MultiplyEach(a, b, (nint)inner * x, c, (nint)n * x, p, accumulate);
                accumulate = true;
            }
        }

        if (!accumulate)
            result.Elements.Slice(checked((int)result.Layout.Offset(block)), checked((int)result.Layout.Size(block))).Clear();
    }
}
