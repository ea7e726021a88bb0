using System.Collections.Immutable;

namespace TensorRG.Physics.Measurements;

/// <summary>Values and bars from the boundary states of one network.</summary>
/// <param name="Names">Observables, in the order of the means.</param>
/// <param name="IsOrdered">True for a state chosen by a field on its first observable.</param>
/// <param name="Points">In ascending bond dimension.</param>
internal sealed record BranchReading(ImmutableArray<string> Names, bool IsOrdered, IReadOnlyList<BranchPoint> Points)
{
    /// <summary>Relative round-off of a fixed point: the Krylov iterations leave some ten units in the last place.</summary>
    private const double RoundOff = 3e-15;

    /// <summary>Power of w for what hardly settles: an order parameter of dimension 1/8, a specific heat that diverges as a logarithm.</summary>
    private const double DivergentPower = 1.0 / 16;

    /// <summary>Bar over the estimated error of a derivative, whose extrapolations are not independent.</summary>
    private const double DerivativeSafety = 5;

    /// <summary>Fall of the smallest weight over a doubling of chi that no critical state shows; there it is some chi^-4.</summary>
    private const double Resolved = 0.01;

    /// <summary>Bar relative to the value beyond which the fixed point itself is in doubt.</summary>
    private const double Unsettled = 1e-6;

    /// <summary>
    /// True if the state is far from a fixed point although the iteration went on: two rows take turns, as in an order of period two, which one tensor a row cannot hold.
    /// </summary>
    public bool Alternates => Points.All(static p => !p.IsConverged) && Points[^1].Residual > 1e-3;

    /// <summary>Distance of ln Z from that of a second method where their bars do not explain it; else 0.</summary>
    public double Disagreement { get; init; }

    /// <summary>Whether a requested quantity is read from this branch.</summary>
    /// <param name="request">What was asked for.</param>
    public bool Has(QuantityRequest request) => request.Observable is { } o && Names.Contains(o.Name);

    /// <summary>Why a value does not carry its bar; empty if it does.</summary>
    /// <param name="value">The value.</param>
    public string Doubt(Estimate value)
    {
        if (Disagreement > 0)
            return FormattableString.Invariant($"ln Z is {Disagreement:0.0e+00} away from that of coarse-graining, so this is another state: use --method blocks");
        double fixedPoint = value.Parts.First(static p => p.Name == "fixed point").Value, bond = value.Parts.First(static p => p.Name == "bond dimension").Value;
        if (!double.IsFinite(value.Value) || !double.IsFinite(value.Error))
            return "not a number: the boundary state is degenerate";
        if (fixedPoint > bond && fixedPoint > Unsettled * Math.Max(1, Math.Abs(value.Value)))
            return "the boundary state did not converge: use --method blocks";
        return bond > 0.1 * Math.Max(Math.Abs(value.Value), 1e-3) ? "does not settle over these bond dimensions: raise --bond-dimension" : "";
    }

    /// <summary>A requested quantity with its bar, and its imaginary part.</summary>
    /// <param name="request">What was asked for.</param>
    public (Estimate Value, double Imaginary) Value(QuantityRequest request) => request.Kind switch
    {
        QuantityKind.LogZ => (LogZ, Points[^1].LogZ.Imaginary),
        QuantityKind.FreeEnergy => (LogZ.Times(request.Factor), request.Factor * Points[^1].LogZ.Imaginary),
        QuantityKind.Entropy => (LogZ.Minus(Mean(IndexOf(request))), 0),
        QuantityKind.Variance => (Variance(IndexOf(request)).Times(request.Factor), 0),
        _ => (Mean(IndexOf(request)), Points[^1].Means[IndexOf(request)].Imaginary),
    };

    /// <summary>How order was obtained, and whether the ordered state is as good as the symmetric one.</summary>
    /// <param name="symmetric">The symmetric state.</param>
    public string OrderRemark(BranchReading symmetric)
    {
        double gap = symmetric.Points[^1].LogZ.Real - Points[^1].LogZ.Real;
        string start = $"Observables that break the symmetry ({string.Join(", ", Names)}) are those of one state, chosen by a field on the {Names[0]} that was switched off again.";
        return gap > 10 * (LogZ.Error + symmetric.LogZ.Error)
            ? start + FormattableString.Invariant($" Its ln Z is lower than that of the symmetric state by {gap:0.0e+00}: it may be metastable.")
            : start;
    }

    /// <summary>ln Z per site with its bar.</summary>
    public Estimate LogZ
    {
        get
        {
            Estimate value = Of(static p => p.LogZ.Real, LogZPower, 1, static p => 100 * p.Residual * p.Residual);
            return Disagreement > 0 ? value with { Parts = value.Parts.Add(new ErrorPart("second method", Disagreement, "distance from a short flow of the default scheme")) } : value;
        }
    }

    /// <summary>The error of ln Z falls about as w where chi resolves the correlation length, and measurably slower, the more so the larger the central charge, at criticality.</summary>
    private double LogZPower => IsResolved ? 0.75 : 0.5;

    /// <summary>Smallest scaling dimension over 2 that is looked for: of the energy at a critical point (1/2 for 4-state Potts), of an order parameter (1/8 for Ising).</summary>
    private double MeanPower => (IsResolved, IsOrdered) switch
    {
        (true, _) => 0.5,
        (false, false) => 0.25,
        (false, true) => DivergentPower,
    };

    /// <summary>True if the weights fall faster than any critical power of chi: the bond dimension resolves the correlation length.</summary>
    private bool IsResolved => Points[^1].SmallestWeight < Resolved * Points[0].SmallestWeight;

    private int IndexOf(QuantityRequest request) => Names.IndexOf(request.Observable!.Name);

    private Estimate Mean(int index) => Of(p => p.Means[index].Real, MeanPower, 10, static p => 10 * p.Residual);

    private Estimate Variance(int index)
    {
        Estimate value = Of(p => p.Variances[index].Value, IsResolved ? MeanPower : DivergentPower, 1e3, static p => 1e4 * p.Residual, skip: Points.Count - 2);
        return value with { Parts = value.Parts.Add(new ErrorPart("derivative", DerivativeSafety * Points[^1].Variances[index].Error, "extrapolation of the derivative by the field to zero step")) };
    }

    /// <summary>The points that tell what a larger bond dimension would change; where the last two keep the same states there are no more to keep, and only they count.</summary>
    private IEnumerable<BranchPoint> Counting(int skip)
        => Points.Skip(Points.Count > 2 && Points[^1].BondDimension == Points[^2].BondDimension ? Points.Count - 2 : Math.Max(0, skip));

    private Estimate Of(Func<BranchPoint, double> read, double power, double conditioning, Func<BranchPoint, double> residual, int skip = 0)
    {
        (double Value, double Weight)[] values = [.. Counting(skip).Select(p => (read(p), p.SmallestWeight))];
        double value = values[^1].Value;
        return new Estimate(
            value,
            [
                new ErrorPart("bond dimension", ChiSequence.Remainder(values, power), $"changes over chi = {string.Join(", ", Counting(skip).Select(static p => p.BondDimension))}"),
                new ErrorPart("fixed point", residual(Points[^1]), FormattableString.Invariant($"residual {Points[^1].Residual:0.0e+00} of the boundary state")),
                new ErrorPart("round-off", conditioning * RoundOff * Math.Max(1, Math.Abs(value)), "a few units in the last place"),
            ]);
    }
}
