using System.Numerics;

namespace TensorRG.Tensors.Kernels;

/// <summary>
/// Short, slow, textbook kernels in plain loops: the reference that every fast backend is tested against, and the
/// backend named <c>plain</c>. Householder-free on purpose: modified Gram-Schmidt applied twice, cyclic Jacobi, one-sided Jacobi.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed unsafe class PlainKernels<T> : IKernels<T>
    where T : unmanaged, INumberBase<T>
{
    private const int MaxSweeps = 60;

    /// <inheritdoc/>
    public void Multiply(MatrixView<T> a, MatrixView<T> b, MatrixView<T> c, bool accumulate)
    {
        for (int i = 0; i < c.Rows; i++)
        {
            for (int j = 0; j < c.Columns; j++)
            {
                T sum = accumulate ? c[i, j] : T.Zero;
                for (int k = 0; k < a.Columns; k++)
                    sum += a.Read(i, k) * b.Read(k, j);
                c[i, j] = sum;
            }
        }
    }

    /// <inheritdoc/>
    public void OrthogonalFactor(MatrixView<T> a, MatrixView<T> r)
    {
        RequireFinite(a, "Thin QR");
        for (int j = 0; j < a.Columns; j++)
        {
            for (int i = 0; i < r.Rows; i++)
                r[i, j] = T.Zero;
            double before = Norm(a, j);
            Project(a, j, r);
            Project(a, j, r);
            double after = Norm(a, j);
            bool independent = after > 1e-14 * before && after > 0;
            r[j, j] = Scalar.FromReal<T>(independent ? after : 0);
            if (independent)
                Scale(a, j, 1 / after);
            else
                Complete(a, j);
        }
    }

    /// <inheritdoc/>
    public void HermitianEigen(MatrixView<T> a, Span<double> values, MatrixView<T> vectors)
    {
        RequireFinite(a, "Eigenproblem");
        int n = a.Rows;
        T[] work = new T[n * n];
        fixed (T* p = work)
        {
            var m = new MatrixView<T>(p, n, n);
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    m[i, j] = a.Read(i, j);
                    vectors[i, j] = i == j ? T.One : T.Zero;
                }
            }

            JacobiEigen(m, vectors);
            for (int i = 0; i < n; i++)
                values[i] = Scalar.RealPart(m[i, i]);
        }

        SortDescending(values, vectors);
    }

    /// <inheritdoc/>
    public void SingularValues(MatrixView<T> a, MatrixView<T> u, Span<double> s, MatrixView<T> v)
    {
        if (a.Rows < a.Columns)
        {
            // A^H = V s U^H: swap the roles.
            SingularValues(a.Adjoint, v, s, u);
            return;
        }

        RequireFinite(a, "Singular values");
        for (int i = 0; i < a.Rows; i++)
        {
            for (int j = 0; j < a.Columns; j++)
                u[i, j] = a.Read(i, j);
        }

        for (int i = 0; i < a.Columns; i++)
        {
            for (int j = 0; j < a.Columns; j++)
                v[i, j] = i == j ? T.One : T.Zero;
        }

        OneSidedJacobi(u, v);
        for (int j = 0; j < a.Columns; j++)
            s[j] = Norm(u, j);
        SortDescending(s, u, v);
        double floor = s.Length == 0 ? 0 : Math.Max(s[0] * 1e-300, 1e-145);
        for (int j = 0; j < a.Columns; j++)
        {
            if (s[j] > floor)
                Scale(u, j, 1 / s[j]);
            else
                Complete(u, j);
        }
    }

    private static void RequireFinite(MatrixView<T> a, string task)
    {
        for (int i = 0; i < a.Rows; i++)
        {
            for (int j = 0; j < a.Columns; j++)
            {
                if (!T.IsFinite(a[i, j]))
                    throw new DecompositionException($"{task} of {a.Rows} x {a.Columns}: the matrix holds NaN or infinity.");
            }
        }
    }

    private static void JacobiEigen(MatrixView<T> m, MatrixView<T> v)
    {
        int n = m.Rows;
        for (int sweep = 0; sweep < MaxSweeps; sweep++)
        {
            double off = 0, all = 0;
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    double w = Scalar.SquaredMagnitude(m[i, j]);
                    all += w;
                    off += i == j ? 0 : w;
                }
            }

            if (off <= 1e-34 * all)
                return;
            if (!double.IsFinite(all))
                throw new DecompositionException($"Eigenproblem of size {n}: the matrix holds NaN or infinity.");
            for (int p = 0; p < n; p++)
            {
                for (int q = p + 1; q < n; q++)
                    Rotate(m, v, p, q);
            }
        }

        throw new DecompositionException($"Eigenproblem of size {n}: {MaxSweeps} Jacobi sweeps did not converge.");
    }

    private static void Rotate(MatrixView<T> m, MatrixView<T> v, int p, int q)
    {
        if (!Rotation(Scalar.RealPart(m[p, p]), Scalar.RealPart(m[q, q]), m[p, q], out double c, out T s))
            return;
        for (int i = 0; i < m.Rows; i++)
            RotatePair(ref m[i, p], ref m[i, q], c, s);
        for (int i = 0; i < m.Rows; i++)
            RotatePair(ref m[p, i], ref m[q, i], c, Scalar.Conjugate(s));

        // Zero by construction; the rounding left here would keep the sweeps from ending.
        m[p, q] = T.Zero;
        m[q, p] = T.Zero;
        for (int i = 0; i < v.Rows; i++)
            RotatePair(ref v[i, p], ref v[i, q], c, s);
    }

    private static void OneSidedJacobi(MatrixView<T> u, MatrixView<T> v)
    {
        int n = u.Columns;
        for (int sweep = 0; sweep < MaxSweeps; sweep++)
        {
            bool rotated = false;
            for (int p = 0; p < n; p++)
            {
                for (int q = p + 1; q < n; q++)
                    rotated |= Orthogonalise(u, v, p, q);
            }

            if (!rotated)
                return;
        }

        throw new DecompositionException($"Singular values of {u.Rows} x {n}: {MaxSweeps} Jacobi sweeps did not converge.");
    }

    private static bool Orthogonalise(MatrixView<T> u, MatrixView<T> v, int p, int q)
    {
        double alpha = 0, beta = 0;
        T gamma = T.Zero;
        for (int i = 0; i < u.Rows; i++)
        {
            alpha += Scalar.SquaredMagnitude(u[i, p]);
            beta += Scalar.SquaredMagnitude(u[i, q]);
            gamma += Scalar.Conjugate(u[i, p]) * u[i, q];
        }

        if (!double.IsFinite(alpha + beta))
            throw new DecompositionException($"Singular values of {u.Rows} x {u.Columns}: NaN or infinity in the matrix.");
        // A column whose square has lost its digits counts as zero: rotating it further never ends.
        if (Math.Min(alpha, beta) < 1e-290 || Scalar.Magnitude(gamma) <= 1e-15 * Math.Sqrt(alpha * beta))
            return false;
        if (!Rotation(alpha, beta, gamma, out double c, out T s))
            return false;
        for (int i = 0; i < u.Rows; i++)
            RotatePair(ref u[i, p], ref u[i, q], c, s);
        for (int i = 0; i < v.Rows; i++)
            RotatePair(ref v[i, p], ref v[i, q], c, s);
        return true;
    }

    /// <summary>The rotation (c real, s complex) that diagonalises the Hermitian [[alpha, gamma], [gamma*, beta]].</summary>
    private static bool Rotation(double alpha, double beta, T gamma, out double c, out T s)
    {
        double size = Scalar.Magnitude(gamma);
        c = 1;
        s = T.Zero;
        if (size == 0)
            return false;
        double zeta = (beta - alpha) / (2 * size);
        double t = (zeta >= 0 ? 1 : -1) / (Math.Abs(zeta) + Math.Sqrt(1 + (zeta * zeta)));
        c = 1 / Math.Sqrt(1 + (t * t));
        s = gamma * Scalar.FromReal<T>(c * t / size);
        return true;
    }

    private static void RotatePair(ref T x, ref T y, double c, T s)
    {
        T cosine = Scalar.FromReal<T>(c);
        T left = (cosine * x) - (Scalar.Conjugate(s) * y);
        y = (s * x) + (cosine * y);
        x = left;
    }

    private static void Project(MatrixView<T> a, int j, MatrixView<T> r)
    {
        for (int k = 0; k < j; k++)
        {
            T overlap = T.Zero;
            for (int i = 0; i < a.Rows; i++)
                overlap += Scalar.Conjugate(a[i, k]) * a[i, j];
            for (int i = 0; i < a.Rows; i++)
                a[i, j] -= overlap * a[i, k];
            r[k, j] += overlap;
        }
    }

    /// <summary>Replaces column j by a unit vector orthogonal to all columns that have been set.</summary>
    private static void Complete(MatrixView<T> a, int j)
    {
        for (int axis = 0; axis < a.Rows; axis++)
        {
            for (int i = 0; i < a.Rows; i++)
                a[i, j] = i == axis ? T.One : T.Zero;
            for (int pass = 0; pass < 2; pass++)
            {
                for (int k = 0; k < j; k++)
                {
                    T overlap = T.Zero;
                    for (int i = 0; i < a.Rows; i++)
                        overlap += Scalar.Conjugate(a[i, k]) * a[i, j];
                    for (int i = 0; i < a.Rows; i++)
                        a[i, j] -= overlap * a[i, k];
                }
            }

            double norm = Norm(a, j);
            if (norm < 0.5 / Math.Sqrt(a.Rows))
                continue;
            Scale(a, j, 1 / norm);
            return;
        }
    }

    private static double Norm(MatrixView<T> a, int j)
    {
        double largest = 0, sum = 0;
        for (int i = 0; i < a.Rows; i++)
            largest = Math.Max(largest, Scalar.Magnitude(a[i, j]));
        if (largest == 0 || !double.IsFinite(largest))
            return largest;
        for (int i = 0; i < a.Rows; i++)
        {
            double x = Scalar.Magnitude(a[i, j]) / largest;
            sum += x * x;
        }

        return largest * Math.Sqrt(sum);
    }

    private static void Scale(MatrixView<T> a, int j, double factor)
    {
        T f = Scalar.FromReal<T>(factor);
        for (int i = 0; i < a.Rows; i++)
            a[i, j] *= f;
    }

    private static void SortDescending(Span<double> keys, params MatrixView<T>[] columns)
    {
        for (int i = 0; i < keys.Length; i++)
        {
            int best = i;
            for (int j = i + 1; j < keys.Length; j++)
                best = keys[j] > keys[best] ? j : best;
            if (best == i)
                continue;
            (keys[i], keys[best]) = (keys[best], keys[i]);
            foreach (MatrixView<T> m in columns)
            {
                for (int row = 0; row < m.Rows; row++)
                    (m[row, i], m[row, best]) = (m[row, best], m[row, i]);
            }
        }
    }
}
