namespace TensorRG.Runs.Tests;

/// <summary>Stands for the end of the process. No clean-up has any effect after it.</summary>
internal sealed class SimulatedDeathException : Exception
{
}
