using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>Random site tensors and gauge changes, all from one seed.</summary>
internal sealed class RandomSite(int seed)
{
    private readonly Random _random = new(seed);

    public static (Leg Up, Leg Left) Legs(SiteKind kind) => kind switch
    {
        SiteKind.Plain => (Leg.Plain(2, Arrow.In), Leg.Plain(2, Arrow.In)),
        SiteKind.Oblong => (Leg.Plain(2, Arrow.In), Leg.Plain(3, Arrow.In)),
        SiteKind.Parity => (Graded([2], (0, 0, 1), (1, 0, 1)), Graded([2], (0, 0, 2), (1, 0, 1))),
        SiteKind.Phase => (Graded([0], (0, 0, 1), (1, 0, 1)), Graded([0], (-1, 0, 1), (0, 0, 1), (1, 0, 1))),
        _ => (Graded([2, 3], (0, 0, 1), (1, 2, 1)), Graded([2, 3], (0, 0, 2), (1, 2, 1))),
    };

    /// <summary>A[u, l, d, r] with elements in (0.1, 1); complex ones get phases within +-0.6.</summary>
    public Tensor<T> Positive<T>(SiteKind kind)
        where T : unmanaged, INumberBase<T>
    {
        (Leg up, Leg left) = Legs(kind);
        return Tensor<T>.FromFunction([up, left, up.Dual, left.Dual], _ => Element<T>(0.1 + (0.9 * _random.NextDouble()), (1.2 * _random.NextDouble()) - 0.6));
    }

    /// <summary>A positive tensor plus a share of random signs or phases, so that Z of a small torus may point anywhere.</summary>
    public Tensor<T> Signed<T>(SiteKind kind)
        where T : unmanaged, INumberBase<T>
    {
        (Leg up, Leg left) = Legs(kind);
        return Tensor<T>.FromFunction([up, left, up.Dual, left.Dual], _ => Element<T>((2 * _random.NextDouble()) - 1, (2 * Math.PI * _random.NextDouble()) - Math.PI));
    }

    /// <summary>X and its inverse on a bond, near the identity so that they are well conditioned; both conserve charge.</summary>
    public (Tensor<T> Change, Tensor<T> Inverse) Gauge<T>(TensorAlgebra<T> algebra, Leg leg)
        where T : unmanaged, INumberBase<T>
    {
        Tensor<T> unit = Tensor<T>.FromFunction([leg, leg.Dual], static p => p.Span[0] == p.Span[1] ? T.One : T.Zero);
        Tensor<T> small = Tensor<T>.FromFunction([leg, leg.Dual], _ => Element<T>(0.3 * (_random.NextDouble() - 0.5), _random.NextDouble()));
        Tensor<T> inverse = unit, power = unit;
        for (int n = 1; n < 60; n++)
        {
            power = TensorAlgebra<T>.Scale(algebra.Contract(power, [1], small, [0]), -T.One);
            inverse = TensorAlgebra<T>.Add(inverse, power, T.One);
        }

        return (TensorAlgebra<T>.Add(unit, small, T.One), inverse);
    }

    private static Leg Graded(int[] orders, params (int First, int Second, int Dimension)[] sectors)
        => new(new AbelianGroup(orders), Arrow.In, sectors.Select(static s => new Sector(new Charge(s.First, s.Second), s.Dimension)));

    private static T Element<T>(double size, double phase)
        where T : unmanaged, INumberBase<T>
        => typeof(T) == typeof(double) ? (T)(object)size : (T)(object)Complex.FromPolarCoordinates(size, phase);
}
