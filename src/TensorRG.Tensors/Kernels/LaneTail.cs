using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace TensorRG.Tensors.Kernels;

/// <summary>Loads and stores of the last one to three lanes of a row, touching no memory beyond them.</summary>
internal static unsafe class LaneTail
{
    /// <summary>The first <paramref name="count"/> (1 .. 3) numbers, followed by zeros.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Vector256<double> Load(double* source, nint count)
    {
        if (count == 1)
            return Vector256.CreateScalar(*source);
        Vector128<double> low = Vector128.Load(source);
        return Vector256.Create(low, count == 2 ? Vector128<double>.Zero : Vector128.CreateScalar(source[2]));
    }

    /// <summary>Stores the first <paramref name="count"/> (1 .. 3) lanes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void Store(Vector256<double> value, double* target, nint count)
    {
        if (count == 1)
        {
            *target = value.ToScalar();
            return;
        }

        value.GetLower().Store(target);
        if (count == 3)
            target[2] = value.GetUpper().ToScalar();
    }
}
