using System.Globalization;
using System.Numerics;

namespace TensorRG.Tensors.Tests.Kernels;

/// <summary>A named matrix of the stress list, row-major.</summary>
/// <param name="Name">Kind and size; the seed follows from it.</param>
/// <param name="Rows">Number of rows.</param>
/// <param name="Columns">Number of columns.</param>
/// <param name="Elements">Row-major elements.</param>
/// <param name="Tame">Whether squares of the elements neither overflow nor vanish, so that plain loops can cope.</param>
internal sealed unsafe record StressMatrix<T>(string Name, int Rows, int Columns, T[] Elements, bool Tame)
    where T : unmanaged, INumberBase<T>
{
    private static readonly int[] Sizes = [0, 1, 2, 3, 4, 5, 7, 8, 9, 15, 16, 17, 31, 33, 44, 64, 65];
    private static readonly int[] LargeSizes = [100, 101, 128, 130];

    private static readonly (int, int)[] Rectangles =
        [(5, 3), (3, 5), (1, 6), (6, 1), (0, 3), (3, 0), (40, 7), (7, 40), (130, 16), (200, 21), (64, 33), (129, 128), (110, 130)];

    private static readonly Dictionary<string, Func<int, double>> Spectra = new()
    {
        ["k^-4"] = static k => Math.Pow(k + 1, -4),
        ["exp(-k/8)"] = static k => Math.Exp(-k / 8.0),
        ["exp(-sqrt k)"] = static k => Math.Exp(-Math.Sqrt(k)),
        ["1/k"] = static k => 1.0 / (k + 1),
        ["pairs"] = static k => 1.0 / ((k / 2) + 1),
        ["clustered"] = static k => 1 + (k * 1e-13),
        ["two levels"] = static k => k % 2 == 0 ? 1 : 1e-9,
        ["exp(-3k)"] = static k => Math.Exp(-3.0 * k),
        ["half zero"] = static k => k % 2 == 0 ? 1.0 / (k + 1) : 0,
    };

    private static readonly Dictionary<string, Func<int, int, Random, T>> General = new()
    {
        ["random"] = static (_, _, r) => StridedMatrix<T>.Element(r),
        ["zero"] = static (_, _, _) => T.Zero,
        ["identity"] = static (i, j, _) => i == j ? T.One : T.Zero,
        ["ones"] = static (_, _, _) => T.One,
        ["shift"] = static (i, j, _) => j == i + 1 ? T.One : T.Zero,
        ["hilbert"] = static (i, j, _) => Real(1.0 / (i + j + 1)),
        ["bidiagonal"] = static (i, j, _) => j == i ? Real(i % 3) : j == i + 1 ? T.One : T.Zero,
        ["triangular"] = static (i, j, r) => j >= i ? StridedMatrix<T>.Element(r) : T.Zero,
        ["every third column zero"] = static (_, j, r) => j % 3 == 1 ? T.Zero : StridedMatrix<T>.Element(r),
        ["equal columns"] = static (i, j, _) => Real(Math.Sin(i + 1) * (1 + (j % 4))),
        ["small end first"] = static (i, j, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, Math.Min(i, j) - 20)),
        ["small end last"] = static (i, j, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, -Math.Max(i, j))),
    };

    private static readonly Dictionary<string, Func<int, int, Random, T>> Wild = new()
    {
        ["1e-200"] = static (_, _, r) => StridedMatrix<T>.Element(r) * Real(1e-200),
        ["1e200"] = static (_, _, r) => StridedMatrix<T>.Element(r) * Real(1e200),
        ["subnormal"] = static (_, _, r) => StridedMatrix<T>.Element(r) * Real(1e-310),
        ["near overflow"] = static (_, _, r) => StridedMatrix<T>.Element(r) * Real(1e306),
        ["graded columns"] = static (_, j, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, 200 - (j * 23 % 400))),
        ["graded rows"] = static (i, _, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, 200 - (i * 23 % 400))),
        ["graded both"] = static (i, j, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, 100 - (3 * (i + j) % 300))),
        ["wild signs"] = static (i, j, r) => StridedMatrix<T>.Element(r) * Real(Math.Pow(10, (r.NextDouble() * 400) - 200)),
    };

    /// <summary>General matrices of all shapes, for QR and singular values.</summary>
    public static IEnumerable<StressMatrix<T>> All(int largest)
    {
        foreach (int n in Sizes.Concat(LargeSizes).Where(n => n <= largest))
        {
            foreach (StressMatrix<T> matrix in OfShape(n, n, n >= 100 ? 3 : 1))
                yield return matrix;
        }

        foreach ((int m, int n) in Rectangles.Where(shape => Math.Max(shape.Item1, shape.Item2) <= largest))
        {
            foreach (StressMatrix<T> matrix in OfShape(m, n, m > 60 ? 4 : 2))
                yield return matrix;
        }
    }

    /// <summary>Hermitian matrices: the general ones plus their adjoint, and chosen spectra with alternating signs.</summary>
    public static IEnumerable<StressMatrix<T>> AllHermitian(int largest)
    {
        foreach (int n in Sizes.Concat(LargeSizes).Where(n => n <= largest))
        {
            int step = n >= 100 ? 3 : 1, index = n;
            foreach ((string kind, Func<int, int, Random, T> element) in General.Concat(Wild))
            {
                if (index++ % step == 0)
                    yield return Hermitian(FromElements(kind, n, n, element, General.ContainsKey(kind)));
            }

            foreach ((string kind, Func<int, double> spectrum) in Spectra)
            {
                if (index++ % step == 0)
                    yield return FromSpectrum(kind, n, n, k => k % 2 == 0 ? spectrum(k) : -spectrum(k), hermitian: true);
            }

            yield return Hermitian(FromElements("wilkinson", n, n, (i, j, _) => Real(i == j ? Math.Abs(i - (n / 2)) / 2.0 : j == i + 1 ? 1 : 0), true));
            yield return Hermitian(FromElements("second difference", n, n, static (i, j, _) => Real(i == j ? 1 : j == i + 1 ? -1 : 0), true));
        }
    }

    /// <summary>U diag(s) V^H (or U diag(s) U^H) with U and V products of random reflectors.</summary>
    public static StressMatrix<T> FromSpectrum(string kind, int m, int n, Func<int, double> spectrum, bool hermitian = false)
    {
        string name = Label(kind, m, n);
        var random = new Random(Seed(name));
        var a = new T[m * n];
        for (int k = 0; k < Math.Min(m, n); k++)
            a[(k * n) + k] = Real(spectrum(k));
        for (int pass = 0; pass < 3; pass++)
        {
            T[] left = UnitVector(m, random), right = hermitian ? left : UnitVector(n, random);
            ReflectRows(a, m, n, left);
            ReflectColumns(a, m, n, right);
        }

        var matrix = new StressMatrix<T>(name, m, n, a, true);
        return hermitian ? Hermitian(matrix) with { Name = name } : matrix;
    }

    /// <summary>The matrix in guarded memory.</summary>
    public StridedMatrix<T> Place(Layout layout, bool conjugated = false)
    {
        var placed = new StridedMatrix<T>(Rows, Columns, layout, new Random(1), conjugated);
        for (int i = 0; i < Rows; i++)
        {
            for (int j = 0; j < Columns; j++)
                placed.View[i, j] = conjugated ? Scalar.Conjugate(Elements[(i * Columns) + j]) : Elements[(i * Columns) + j];
        }

        return placed;
    }

    private static IEnumerable<StressMatrix<T>> OfShape(int m, int n, int step)
    {
        int index = n;
        foreach ((string kind, Func<int, int, Random, T> element) in General.Concat(Wild))
        {
            if (index++ % step == 0)
                yield return FromElements(kind, m, n, element, General.ContainsKey(kind));
        }

        foreach ((string kind, Func<int, double> spectrum) in Spectra)
        {
            if (index++ % step == 0)
                yield return FromSpectrum(kind, m, n, spectrum);
        }
    }

    private static StressMatrix<T> FromElements(string kind, int m, int n, Func<int, int, Random, T> element, bool tame)
    {
        string name = Label(kind, m, n);
        var random = new Random(Seed(name));
        var a = new T[m * n];
        for (int i = 0; i < m; i++)
        {
            for (int j = 0; j < n; j++)
                a[(i * n) + j] = element(i, j, random);
        }

        return new StressMatrix<T>(name, m, n, a, tame);
    }

    /// <summary>The Hermitian matrix with the same upper triangle.</summary>
    private static StressMatrix<T> Hermitian(StressMatrix<T> a)
    {
        int n = a.Rows;
        for (int i = 0; i < n; i++)
        {
            a.Elements[(i * n) + i] = Real(Scalar.RealPart(a.Elements[(i * n) + i]));
            for (int j = i + 1; j < n; j++)
                a.Elements[(j * n) + i] = Scalar.Conjugate(a.Elements[(i * n) + j]);
        }

        return a with { Name = "hermitian " + a.Name };
    }

    private static T[] UnitVector(int n, Random random)
    {
        var v = new T[n];
        double sum = 0;
        for (int i = 0; i < n; i++)
        {
            v[i] = StridedMatrix<T>.Element(random);
            sum += Scalar.SquaredMagnitude(v[i]);
        }

        for (int i = 0; i < n; i++)
            v[i] *= Real(1 / Math.Sqrt(sum));
        return v;
    }

    private static void ReflectRows(T[] a, int m, int n, T[] v)
    {
        for (int j = 0; j < n; j++)
        {
            T overlap = T.Zero;
            for (int i = 0; i < m; i++)
                overlap += Scalar.Conjugate(v[i]) * a[(i * n) + j];
            for (int i = 0; i < m; i++)
                a[(i * n) + j] -= (overlap + overlap) * v[i];
        }
    }

    private static void ReflectColumns(T[] a, int m, int n, T[] v)
    {
        for (int i = 0; i < m; i++)
        {
            T overlap = T.Zero;
            for (int j = 0; j < n; j++)
                overlap += a[(i * n) + j] * v[j];
            for (int j = 0; j < n; j++)
                a[(i * n) + j] -= (overlap + overlap) * Scalar.Conjugate(v[j]);
        }
    }

    private static T Real(double value) => Scalar.FromReal<T>(value);

    private static string Label(string kind, int m, int n) => string.Create(CultureInfo.InvariantCulture, $"{kind} {m} x {n}");

    /// <summary>A seed that is the same in every process, which string.GetHashCode is not.</summary>
    private static int Seed(string name) => name.Aggregate(17, static (hash, c) => unchecked((hash * 31) + c));
}
