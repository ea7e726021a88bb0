using TensorRG.Physics.Measurements;

namespace TensorRG.Cli.Output;

/// <summary>How far a measured number is from the exact one.</summary>
internal static class MeasuredValue
{
    /// <summary>(value - exact) / |exact|; the difference itself where the exact value is 0; NaN where none is known.</summary>
    public static double Deviation(Measured measured) => measured.Exact switch
    {
        null => double.NaN,
        { Value: 0 } => measured.Value.Value,
        { } exact => (measured.Value.Value - exact.Value) / Math.Abs(exact.Value),
    };

    /// <summary>Whether the exact value lies inside the bar; null where none is known.</summary>
    public static bool? IsCovered(Measured measured) => measured.Exact is not { } exact
        ? null
        : Math.Abs(measured.Value.Value - exact.Value) <= measured.Value.Error + exact.Uncertainty;

    /// <summary>The unit in brackets, or nothing for a pure number.</summary>
    public static string InBrackets(string unit) => unit is "none" or "" ? "" : $" [{unit}]";
}
