namespace TensorRG.Runs.Points;

/// <summary>Where the temperature of each point of a grid comes from.</summary>
public enum TemperatureRule
{
    /// <summary>It is a fixed parameter or an axis, or the model has none.</summary>
    Given,

    /// <summary>Not given: the model's default at the other parameters of the point, the critical one where that is known.</summary>
    Default,

    /// <summary>The exact critical temperature at the other parameters of the point.</summary>
    Critical,
}
