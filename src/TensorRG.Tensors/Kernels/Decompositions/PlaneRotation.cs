using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Kernels.Decompositions;

/// <summary>Givens rotations for matrices of largest element near one.</summary>
internal static class PlaneRotation
{
    /// <summary>(c, s, r) with c f + s g = r, c g - s f = 0, c^2 + s^2 = 1 to round-off even for tiny f and g.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static (double C, double S, double R) Generate(double f, double g)
    {
        double square = (f * f) + (g * g);
        if (square < Entry.TinySquare)
            return GenerateTiny(f, g);
        double r = Math.Sqrt(square);
        return (f / r, g / r, r);
    }

    private static (double C, double S, double R) GenerateTiny(double f, double g)
    {
        // 2^600 lifts what is worth keeping out of the subnormal range; the rest is zero beside a norm of one.
        double liftedF = Math.ScaleB(f, 600), liftedG = Math.ScaleB(g, 600);
        double square = (liftedF * liftedF) + (liftedG * liftedG);
        if (square < Entry.TinySquare)
            return (1, 0, 0);
        double r = Math.Sqrt(square);
        return (liftedF / r, liftedG / r, Math.ScaleB(r, -600));
    }
}
