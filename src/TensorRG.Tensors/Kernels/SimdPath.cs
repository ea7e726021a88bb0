namespace TensorRG.Tensors.Kernels;

/// <summary>The instruction set the managed kernels use. All paths give the same bits; only the speed differs.</summary>
public enum SimdPath
{
    /// <summary>128-bit vectors through the cross-platform API: any CPU, ARM64 included.</summary>
    Portable,

    /// <summary>256-bit vectors with fused multiply-add (x86-64 with AVX2 and FMA).</summary>
    Avx2,

    /// <summary>512-bit vectors (x86-64 with AVX-512 F, DQ, BW, CD and VL).</summary>
    Avx512,
}
