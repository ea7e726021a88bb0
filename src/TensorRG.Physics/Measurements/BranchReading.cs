using System.Collections.Immutable;

namespace TensorRG.Physics.Measurements;

/// <summary>Values and bars from the boundary states of one network.</summary>
/// <param name="Names">Observables, in the order of the means.</param>
/// <param name="Points">In ascending bond dimension.</param>
internal sealed record BranchReading(ImmutableArray<string> Names, IReadOnlyList<BranchPoint> Points)
{
    private const double RoundOff = 4 * 2.2e-16;

    /// <summary>Whether the state of the largest bond dimension converged.</summary>
    public bool IsConverged => Points[^1].IsConverged;

    /// <summary>A requested quantity with its bar, and its imaginary part.</summary>
    /// <param name="request">What was asked for.</param>
    public (Estimate Value, double Imaginary) Value(QuantityRequest request) => request.Kind switch
    {
        QuantityKind.LogZ => (LogZ, Points[^1].LogZ.Imaginary),
        QuantityKind.FreeEnergy => (LogZ.Times(request.Factor), request.Factor * Points[^1].LogZ.Imaginary),
        QuantityKind.Entropy => (Entropy(IndexOf(request)), 0),
        QuantityKind.Variance => (Variance(IndexOf(request)).Times(request.Factor), 0),
        _ => (Mean(IndexOf(request)), Points[^1].Means[IndexOf(request)].Imaginary),
    };

    /// <summary>How order was obtained, and whether the ordered state is as good as the symmetric one.</summary>
    /// <param name="symmetric">The symmetric state.</param>
    /// <param name="order">The observable whose field chose the state.</param>
    public string OrderRemark(BranchReading symmetric, string order)
    {
        double gap = symmetric.Points[^1].LogZ.Real - Points[^1].LogZ.Real;
        string start = $"Observables that break the symmetry ({string.Join(", ", Names)}) are those of one state, chosen by a field on the {order} that was switched off again.";
        return gap > 10 * (LogZ.Error + symmetric.LogZ.Error)
            ? start + FormattableString.Invariant($" Its ln Z is lower than that of the symmetric state by {gap:0.0e+00}: it may be metastable.")
            : start;
    }

    private Estimate LogZ => Of(static p => p.LogZ.Real, 1, static p => 100 * p.Residual * p.Residual);

    private int IndexOf(QuantityRequest request) => Names.IndexOf(request.Observable!.Name);

    private Estimate Mean(int index) => Of(p => p.Means[index].Real, 10, static p => 10 * p.Residual);

    private Estimate Entropy(int index)
    {
        Estimate mean = Mean(index), logZ = LogZ;
        return new Estimate(logZ.Value - mean.Value, [.. logZ.Parts.Zip(mean.Parts, static (a, b) => a with { Value = a.Value + b.Value })]);
    }

    private Estimate Variance(int index)
    {
        Estimate value = Of(p => p.Variances[index].Value, 1e3, static p => 1e3 * p.Residual);
        return value with { Parts = value.Parts.Add(new ErrorPart("derivative", Points[^1].Variances[index].Error, "extrapolation of the derivative by the field to zero step")) };
    }

    private Estimate Of(Func<BranchPoint, double> read, double conditioning, Func<BranchPoint, double> residual)
    {
        double[] values = [.. Points.Select(read)];
        return new Estimate(
            values[^1],
            [
                new ErrorPart("bond dimension", ChiSequence.Remainder(values), $"changes over chi = {string.Join(", ", Points.Select(static p => p.BondDimension))}"),
                new ErrorPart("fixed point", residual(Points[^1]), FormattableString.Invariant($"residual {Points[^1].Residual:0.0e+00} of the boundary state")),
                new ErrorPart("round-off", conditioning * RoundOff * Math.Max(1, Math.Abs(values[^1])), "a few units in the last place"),
            ]);
    }
}
