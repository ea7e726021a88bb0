namespace TensorRG.Physics.Measurements;

/// <summary>Measures observables of a model. The same inputs give the same bits on any number of threads.</summary>
public interface IMeasurer
{
    /// <summary>Measures.</summary>
    /// <param name="inputs">What and how.</param>
    /// <param name="progress">Told now and then in a few words what is going on; may be null.</param>
    /// <param name="stop">Stops at the next chance.</param>
    /// <exception cref="TensorRG.Models.ModelException">A quantity that this model does not have, or a network that cannot be built; the message has the remedy.</exception>
    /// <exception cref="OperationCanceledException">Stopped.</exception>
    Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop);
}
