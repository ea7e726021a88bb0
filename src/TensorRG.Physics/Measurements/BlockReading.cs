using System.Collections.Immutable;
using TensorRG.CoarseGraining.Moments;

namespace TensorRG.Physics.Measurements;

/// <summary>Values and bars from the moment flows of one network at two bond dimensions.</summary>
internal sealed class BlockReading
{
    /// <summary>Bar of ln Z over its change from one bond dimension to the next, about 2 to 3: the same as for moments.</summary>
    private const double SafetyFactor = 2;

    private const double RoundOff = 1e-14;

    private readonly ImmutableArray<string> _names;
    private readonly IReadOnlyList<IReadOnlyList<MomentRecord>> _flows;
    private readonly TorusMoments _moments;
    private readonly bool _breaks;

    /// <param name="names">Observables, in the order of the records' moments.</param>
    /// <param name="flows">The records of each flow, in ascending bond dimension.</param>
    /// <param name="isTorus">True for the torus of the last step; false for the infinite lattice.</param>
    /// <param name="breaks">True if the observables break a symmetry: their mean on a torus is zero, and order shows in the mean square.</param>
    public BlockReading(ImmutableArray<string> names, IReadOnlyList<IReadOnlyList<MomentRecord>> flows, bool isTorus, bool breaks)
    {
        (_names, _flows, IsTorus, _breaks) = (names, flows, isTorus, breaks);
        _moments = new TorusMoments(flows);
    }

    /// <summary>True for the torus of the last step; false for the infinite lattice.</summary>
    public bool IsTorus { get; }

    /// <summary>Whether a requested quantity is read from here.</summary>
    /// <param name="request">What was asked for.</param>
    public bool Has(QuantityRequest request) => request.Observable is { } o && _names.Contains(o.Name);

    private int LastStep => _flows[^1].Count - 1;

    /// <summary>A requested quantity with its bar, and its imaginary part.</summary>
    /// <param name="request">What was asked for.</param>
    public (Estimate Value, double Imaginary) Value(QuantityRequest request)
    {
        MomentRecord last = _flows[^1][^1];
        return request.Kind switch
        {
            QuantityKind.LogZ => (LogZ, last.TorusPhase / last.Sites),
            QuantityKind.FreeEnergy => (LogZ.Times(request.Factor), request.Factor * last.TorusPhase / last.Sites),
            QuantityKind.Entropy => (LogZ.Minus(Moment(request, 1)), 0),
            QuantityKind.Variance => (Variance(request).Times(request.Factor), 0),
            QuantityKind.Binder => (_moments.Binder(LastStep, IndexOf(request)), 0),
            QuantityKind.Mean when _breaks && !IsTorus => (RootMeanSquare(request), 0),
            _ => (Moment(request, request.Power), last.Moments[IndexOf(request)][request.Power - 1].Imaginary),
        };
    }

    private int IndexOf(QuantityRequest request) => _names.IndexOf(request.Observable!.Name);

    private Estimate LogZ
    {
        get
        {
            Func<IReadOnlyList<MomentRecord>, double> read = IsTorus ? static records => records[^1].LogZTorusPerSite : Bulk;
            double value = read(_flows[^1]), change = Math.Abs(value - read(_flows[^2]));
            return new Estimate(
                value,
                [
                    new ErrorPart("truncation", SafetyFactor * change, FormattableString.Invariant($"{SafetyFactor} times the change from bond dimension {_flows[^2][^1].BondDimension} to {_flows[^1][^1].BondDimension}")),
                    new ErrorPart("round-off", RoundOff * Math.Max(1, Math.Abs(value)), "a few units in the last place"),
                    new ErrorPart("size", IsTorus ? 0 : Math.Abs(value - Bulk([.. _flows[^1].SkipLast(2)])), "how much the last doublings still moved it"),
                ]);
        }
    }

    /// <summary>The infinite lattice from the last two tori of the same shape: the universal factor of the torus drops out.</summary>
    private static double Bulk(IReadOnlyList<MomentRecord> records)
        => records[^1].LogZTorusPerSite + ((records[^1].LogZTorusPerSite - records[^3].LogZTorusPerSite) / 3);

    private Estimate Moment(QuantityRequest request, int power)
    {
        Estimate value = _moments.Moment(LastStep, IndexOf(request), power);
        return IsTorus ? value : WithSize(value, value.Value - _moments.Moment(LastStep - 2, IndexOf(request), power).Value);
    }

    private Estimate RootMeanSquare(QuantityRequest request)
    {
        Estimate square = Moment(request, 2);
        double root = Math.Sqrt(Math.Max(0, square.Value));
        double lowest = Math.Sqrt(Math.Max(0, square.Value - square.Error)), highest = Math.Sqrt(Math.Max(0, square.Value + square.Error));
        double scale = square.Error == 0 ? 0 : Math.Max(root - lowest, highest - root) / square.Error;
        return new Estimate(root, [.. square.Parts.Select(p => p with { Value = p.Value * scale })]);
    }

    /// <summary>N times the second central moment: of the torus, or where it settles as the torus grows.</summary>
    private Estimate Variance(QuantityRequest request)
    {
        int index = IndexOf(request);
        if (IsTorus)
            return _moments.Fluctuation(LastStep, index);
        int best = Enumerable.Range(2, (LastStep - 2) / 2).Select(static i => 2 * i).MinBy(Change);
        return WithSize(_moments.Fluctuation(best, index), Change(best));

        double Change(int step) => Math.Abs(_moments.Fluctuation(step, index).Value - _moments.Fluctuation(step - 2, index).Value);
    }

    private static Estimate WithSize(Estimate value, double change)
        => value with { Parts = value.Parts.Add(new ErrorPart("size", Math.Abs(change), "how much the last doublings still moved it")) };
}
