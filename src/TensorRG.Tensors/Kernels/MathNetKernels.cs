using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Factorization;
using TensorRG.Tensors.Kernels.Decompositions;

namespace TensorRG.Tensors.Kernels;

/// <summary>Kernels on Math.NET matrices: everything is copied in and out, scaled by a power of two.</summary>
internal sealed class MathNetKernels<T> : IKernels<T>
    where T : unmanaged, INumberBase<T>, IEquatable<T>, IFormattable
{
    /// <inheritdoc/>
    public void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
    {
        if (c.Rows == 0 || c.Columns == 0)
            return;
        Matrix<T>? product = a.Columns == 0 ? null : Copy(a, 0) * Copy(b, 0);
        for (int i = 0; i < c.Rows; i++)
        {
            for (int j = 0; j < c.Columns; j++)
                c[i, j] = (accumulate ? c[i, j] : T.Zero) + (product is null ? T.Zero : product[i, j]);
        }
    }

    /// <inheritdoc/>
    public void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r)
    {
        if (a.Columns == 0)
            return;
        int exponent = Entry.Exponent(Entry.FiniteLargestPart(a, "Thin QR"));
        QR<T> qr = Copy(a, exponent).QR(QRMethod.Thin);
        T back = Scalar.FromReal<T>(Math.ScaleB(1, exponent));
        for (int k = 0; k < a.Columns; k++)
        {
            T diagonal = qr.R[k, k];
            double size = Scalar.Magnitude(diagonal);
            T phase = size == 0 ? T.One : diagonal / Scalar.FromReal<T>(size);
            for (int i = 0; i < a.Rows; i++)
                a[i, k] = qr.Q[i, k] * phase;
            for (int j = 0; j < a.Columns; j++)
                r[k, j] = j < k ? T.Zero : j == k ? Scalar.FromReal<T>(size) * back : Scalar.Conjugate(phase) * qr.R[k, j] * back;
        }
    }

    /// <inheritdoc/>
    public void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
    {
        int n = a.Rows;
        if (n == 0)
            return;
        int exponent = Entry.Exponent(Entry.FiniteLargestPart(a, "Eigenproblem"));
        Evd<T> evd = Guard(() => Copy(a, exponent).Evd(Symmetricity.Hermitian), "Eigenproblem", a);
        double[] found = new double[n];
        for (int j = 0; j < n; j++)
            found[j] = evd.EigenValues[j].Real;
        int[] order = Ordering.Descending(found);
        for (int j = 0; j < n; j++)
        {
            values[j] = Math.ScaleB(found[order[j]], exponent);
            for (int i = 0; i < n; i++)
                vectors[i, j] = evd.EigenVectors[i, order[j]];
        }
    }

    /// <inheritdoc/>
    public void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
    {
        int k = Math.Min(a.Rows, a.Columns);
        if (k == 0)
            return;
        int exponent = Entry.Exponent(Entry.FiniteLargestPart(a, "Singular values"));
        Svd<T> svd = Guard(() => Copy(a, exponent).Svd(), "Singular values", a);
        for (int j = 0; j < k; j++)
        {
            s[j] = Math.ScaleB(Scalar.RealPart(svd.S[j]), exponent);
            for (int i = 0; i < a.Rows; i++)
                u[i, j] = svd.U[i, j];
            for (int i = 0; i < a.Columns; i++)
                v[i, j] = Scalar.Conjugate(svd.VT[j, i]);
        }
    }

    private static Matrix<T> Copy(MatrixView<T> a, int exponent)
    {
        Matrix<T> copy = Matrix<T>.Build.Dense(a.Rows, a.Columns);
        T factor = Scalar.FromReal<T>(Math.ScaleB(1, -exponent));
        for (int i = 0; i < a.Rows; i++)
        {
            for (int j = 0; j < a.Columns; j++)
                copy[i, j] = a.Read(i, j) * factor;
        }

        return copy;
    }

    private static TResult Guard<TResult>(Func<TResult> compute, string task, MatrixView<T> a)
    {
        try
        {
            return compute();
        }
        catch (MathNet.Numerics.NonConvergenceException e)
        {
            throw new DecompositionException($"{task} of {a.Rows} x {a.Columns}: Math.NET did not converge.", e);
        }
    }
}
