namespace TensorRG.Models;

/// <summary>The exact critical temperature of a model at given other parameters, or why there is none.</summary>
public sealed record CriticalPoint
{
    private CriticalPoint(ExactValue? temperature, string? reason)
    {
        Temperature = temperature;
        Reason = reason;
    }

    /// <summary>The transition temperature, or null where none is known exactly.</summary>
    public ExactValue? Temperature { get; }

    /// <summary>Why there is none; null where there is one.</summary>
    public string? Reason { get; }

    /// <summary>A known transition temperature.</summary>
    /// <param name="value">Its value and source.</param>
    public static CriticalPoint At(ExactValue value) => new(value, null);

    /// <summary>No transition temperature.</summary>
    /// <param name="reason">Why, as a clause that completes "there is no exact critical temperature: ...".</param>
    public static CriticalPoint None(string reason) => new(null, reason);
}
