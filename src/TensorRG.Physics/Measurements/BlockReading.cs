using System.Collections.Immutable;
using System.Numerics;
using TensorRG.CoarseGraining.Moments;

namespace TensorRG.Physics.Measurements;

/// <summary>Values and bars from moment flows of one network through a sequence of bond dimensions.</summary>
/// <param name="Names">Observables, in the order of the records' moments.</param>
/// <param name="BondDimensions">The sequence, ascending.</param>
/// <param name="Flows">The records of each flow.</param>
/// <param name="IsTorus">True for the torus of the last step; false for the infinite lattice.</param>
/// <param name="Breaks">True if the observables break a symmetry: their mean on a torus is zero, and order shows in the mean square.</param>
internal sealed record BlockReading(
    ImmutableArray<string> Names, ImmutableArray<int> BondDimensions, IReadOnlyList<IReadOnlyList<MomentRecord>> Flows, bool IsTorus, bool Breaks)
{
    private const double RoundOff = 1e-13;

    /// <summary>A requested quantity with its bar, and its imaginary part.</summary>
    /// <param name="request">What was asked for.</param>
    public (Estimate Value, double Imaginary) Value(QuantityRequest request) => request.Kind switch
    {
        QuantityKind.LogZ => (LogZ, IsTorus ? Flows[^1][^1].TorusPhase / Flows[^1][^1].Sites : 0),
        QuantityKind.FreeEnergy => (LogZ.Times(request.Factor), 0),
        QuantityKind.Entropy => (Minus(LogZ, Moment(request, 1)), 0),
        QuantityKind.Variance => (Variance(request).Times(request.Factor), 0),
        QuantityKind.Moment => (Moment(request, request.Power), Last(request, request.Power).Imaginary),
        QuantityKind.Binder => (Binder(request), 0),
        _ when Breaks && !IsTorus => (RootMeanSquare(request), 0),
        _ => (Moment(request, 1), Last(request, 1).Imaginary),
    };

    /// <summary>ln Z per site: of the torus, or of the infinite lattice from the last two tori of the same shape.</summary>
    private Estimate LogZ => IsTorus
        ? Of(_ => 0, static records => records[^1].LogZTorusPerSite)
        : Of(static records => Bulk(records) - Bulk([.. records.SkipLast(2)]), Bulk);

    private static double Bulk(IReadOnlyList<MomentRecord> records)
        => records[^1].LogZTorusPerSite + ((records[^1].LogZTorusPerSite - records[^3].LogZTorusPerSite) / 3);

    private Complex Last(QuantityRequest request, int power) => Read(Flows[^1][^1], request, power);

    private Complex Read(MomentRecord record, QuantityRequest request, int power) => record.Moments[IndexOf(request)][power - 1];

    private int IndexOf(QuantityRequest request) => Names.IndexOf(request.Observable!.Name);

    private Estimate Moment(QuantityRequest request, int power)
        => Of(records => IsTorus ? 0 : Settling(records, r => Read(r, request, power).Real), records => Read(records[^1], request, power).Real);

    private Estimate RootMeanSquare(QuantityRequest request)
    {
        return Of(records => Settling(records, Root), records => Root(records[^1]));

        double Root(MomentRecord r) => Math.Sqrt(Math.Abs(Read(r, request, 2).Real));
    }

    private Estimate Binder(QuantityRequest request)
    {
        return Of(_ => 0, records => Ratio(records[^1]));

        double Ratio(MomentRecord r) => 1 - (Read(r, request, 4).Real / (3 * Math.Pow(Read(r, request, 2).Real, 2)));
    }

    /// <summary>N times the second central moment: of the torus, or where it settles as the torus grows.</summary>
    private Estimate Variance(QuantityRequest request)
    {
        int index = IndexOf(request);
        return IsTorus
            ? Of(_ => 0, records => At(records[^1]))
            : Of(records => Plateau(records).Change, records => Plateau(records).Value);

        double At(MomentRecord r) => r.Sites * r.CentralMoments[index][1].Real;
        (double Value, double Change) Plateau(IReadOnlyList<MomentRecord> records)
        {
            double[] squares = [.. records.Where(static r => r.AspectRatio == 1).Select(At)];
            return Enumerable.Range(1, squares.Length - 1).Select(i => (squares[i], Math.Abs(squares[i] - squares[i - 1]))).MinBy(static x => x.Item2);
        }
    }

    private static double Settling(IReadOnlyList<MomentRecord> records, Func<MomentRecord, double> read) => Math.Abs(read(records[^1]) - read(records[^3]));

    private static Estimate Minus(Estimate a, Estimate b)
        => new(a.Value - b.Value, [.. a.Parts.Zip(b.Parts, static (x, y) => x with { Value = x.Value + y.Value })]);

    private Estimate Of(Func<IReadOnlyList<MomentRecord>, double> settling, Func<IReadOnlyList<MomentRecord>, double> read)
    {
        double[] values = [.. Flows.Select(read)];
        return new Estimate(
            values[^1],
            [
                new ErrorPart("bond dimension", ChiSequence.Remainder(values), $"changes over chi = {string.Join(", ", BondDimensions)}"),
                new ErrorPart("size", Math.Abs(settling(Flows[^1])), IsTorus ? "none: a torus of the size asked for" : "how much the last doublings still moved it"),
                new ErrorPart("round-off", RoundOff * Math.Max(1, Math.Abs(values[^1])), "a few units in the last place, summed over the steps"),
            ]);
    }
}
