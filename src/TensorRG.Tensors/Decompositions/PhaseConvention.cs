using System.Numerics;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Decompositions;

/// <summary>
/// Fixes the free phase of singular and eigenvectors: the first element of a column whose magnitude comes within a part
/// in a million of the largest becomes real and positive.
/// </summary>
internal static class PhaseConvention
{
    private const double Tie = 1 - 1e-6;

    /// <summary>Turns column j of U, and of V with it, so that U diag V^H stays the same.</summary>
    public static void Apply<T>(MatrixView<T> u, MatrixView<T> v)
        where T : unmanaged, INumberBase<T>
    {
        for (int j = 0; j < u.Columns; j++)
        {
            T turn = Turn(u, j);
            if (turn == T.One)
                continue;
            Multiply(u, j, turn);
            if (v.Columns > j)
                Multiply(v, j, turn);
        }
    }

    private static T Turn<T>(MatrixView<T> u, int j)
        where T : unmanaged, INumberBase<T>
    {
        double largest = 0;
        for (int i = 0; i < u.Rows; i++)
            largest = Math.Max(largest, Scalar.Magnitude(u[i, j]));
        for (int i = 0; i < u.Rows && largest > 0; i++)
        {
            double size = Scalar.Magnitude(u[i, j]);
            if (size >= Tie * largest)
                return Scalar.Conjugate(u[i, j]) / Scalar.FromReal<T>(size);
        }

        return T.One;
    }

    private static void Multiply<T>(MatrixView<T> m, int j, T factor)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < m.Rows; i++)
            m[i, j] *= factor;
    }
}
