namespace TensorRG.Physics.Measurements;

/// <summary>How a quantity comes about.</summary>
internal enum QuantityKind
{
    /// <summary>ln Z / N.</summary>
    LogZ,

    /// <summary>-T ln Z / N.</summary>
    FreeEnergy,

    /// <summary>S / N = ln Z / N - &lt;ln w&gt; / N, w the weight of the configuration; with a temperature (U - F) / (N T).</summary>
    Entropy,

    /// <summary>&lt;O&gt; / N.</summary>
    Mean,

    /// <summary>(&lt;O^2&gt; - &lt;O&gt;^2) / N times a factor.</summary>
    Variance,

    /// <summary>&lt;O^n&gt; / N^n on a torus.</summary>
    Moment,

    /// <summary>1 - &lt;O^4&gt; / (3 &lt;O^2&gt;^2) on a torus.</summary>
    Binder,
}
