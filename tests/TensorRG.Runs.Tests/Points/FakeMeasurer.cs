using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Physics.Measurements;

namespace TensorRG.Runs.Tests.Points;

/// <summary>Numbers that depend on the inputs alone, awkward ones among them, and a failure where h is 0.2.</summary>
internal sealed class FakeMeasurer(Action<double>? before = null) : IMeasurer
{
    public Measurement Measure(MeasurementInputs inputs, IProgress<string>? progress, CancellationToken stop)
    {
        stop.ThrowIfCancellationRequested();
        double t = inputs.Parameters.Temperature, h = inputs.Parameters["h"];
        before?.Invoke(h);
        if (h == 0.2)
            throw new ArithmeticException("The iteration did not settle.");
        return new Measurement([.. inputs.Quantities.Select((q, i) => Value(q, Math.Sin((1000 * t) + h + i), h))], ["A remark, with \"quotes\" and χ."]);
    }

    private static Measured Value(string name, double value, double h) => new(
        name,
        "meaning of " + name,
        "energy",
        new Estimate(h == 0.1 ? double.NaN : value, [new ErrorPart("truncation", h == 0.3 ? double.PositiveInfinity : 1e-300 * value, "basis"), new ErrorPart("zero", -0.0, "")]),
        h == 0.4 ? -0.0 : h,
        h != 0.5,
        "",
        h == 0 ? new ExactValue(1 / 3.0, 1e-16, "source", "note") : null);
}
