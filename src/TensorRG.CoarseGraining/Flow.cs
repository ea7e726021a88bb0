using System.Diagnostics;
using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.CoarseGraining;

/// <summary>
/// Runs one scheme on one network. The tensor is rescaled after every step so that its transfer matrix has unit norm;
/// with norms g_n, ln Z of the torus of one tensor per vertex is sum_{m&lt;=n} ln(g_m) / 2^m + ln|Tr M_n| / 2^n.
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
public sealed class Flow<T> : IFlow
    where T : unmanaged, INumberBase<T>
{
    /// <summary>How far from 1 round-off may leave the norm of a restored transfer matrix.</summary>
    private const double NormTolerance = 1e-9;

    /// <summary>
    /// Steps over which a transfer matrix may be exactly zero: a ring of one vertex may have no allowed configuration (neighbours that must
    /// differ) though longer rings have many.
    /// </summary>
    private const int LongestZero = 3;

    private readonly IScheme<T> _scheme;
    private readonly InitialNetwork<T> _network;
    private readonly List<StepRecord> _records = [];
    private NetworkState<T> _state;
    private CompensatedSum _logScale;

    /// <summary>A flow at step 0.</summary>
    /// <param name="scheme">The scheme.</param>
    /// <param name="network">Where it starts.</param>
    /// <exception cref="ArithmeticException">The network's torus of one vertex has a transfer matrix that is zero or not finite.</exception>
    public Flow(IScheme<T> scheme, InitialNetwork<T> network)
    {
        ArgumentNullException.ThrowIfNull(scheme);
        ArgumentNullException.ThrowIfNull(network);
        _scheme = scheme;
        _network = network;
        long start = Stopwatch.GetTimestamp();
        _logScale.Add(network.LogPrefactor);
        _state = scheme.Begin(network.Site);
        Record(new CoarseStep<T>(_state, 0, []), start);
    }

    /// <inheritdoc/>
    public int Step => _records.Count - 1;

    /// <inheritdoc/>
    public IReadOnlyList<StepRecord> Records => _records;

    /// <inheritdoc/>
    public StepRecord Advance()
    {
        long start = Stopwatch.GetTimestamp();
        NetworkState<T> before = _state;
        StepRecord record = Record(_scheme.Step(before, Step + 1), start);

        // Only now: a step that fails leaves the flow where it was, so that it can still be saved.
        foreach (Tensor<T> tensor in before.Tensors.Values)
            tensor.Dispose();
        return record;
    }

    /// <inheritdoc/>
    public Snapshot Save()
    {
        var writer = new SnapshotWriter(Step);
        writer.Add("log-scale", _logScale.High, _logScale.Low);
        StateCodec.Write(writer, _state);
        RecordCodec.Write(writer, _records);
        return writer.ToSnapshot();
    }

    /// <inheritdoc/>
    public void Restore(Snapshot snapshot)
    {
        ArgumentNullException.ThrowIfNull(snapshot);
        var reader = new SnapshotReader(snapshot);
        double[] sum = reader.Numbers("log-scale", 2);
        List<StepRecord> records = RecordCodec.Read(reader);
        if (records.Count != snapshot.Step + 1)
            throw new SnapshotException($"The snapshot of step {snapshot.Step} holds {records.Count} records.");
        NetworkState<T> state = ReadState(reader, records[^1]);
        _state = state;
        _logScale = new CompensatedSum(sum[0], sum[1]);
        _records.Clear();
        _records.AddRange(records);
    }

    /// <summary>
    /// A state belongs to its record if it has the record's bonds and a transfer matrix of unit norm. That needs every
    /// tensor and every weight: one that is missing, altered or of another shape does not pass.
    /// </summary>
    private NetworkState<T> ReadState(SnapshotReader reader, StepRecord record)
    {
        try
        {
            NetworkState<T> state = StateCodec.Read<T>(reader, _network.Site.Legs[0].Group);
            (Leg vertical, Leg horizontal) = _scheme.Bonds(state);
            if (!BondProfile.Of(vertical).SequenceEqual(record.VerticalBond) || !BondProfile.Of(horizontal).SequenceEqual(record.HorizontalBond))
                throw new SnapshotException("The bonds of the snapshot's tensors are not those of its last record.");
            double norm = TensorAlgebra<T>.Norm(_scheme.TransferMatrix(state));
            return Math.Abs(norm - 1) <= NormTolerance || (norm == 0 && double.IsNegativeInfinity(record.LogZTorusPerSite))
                ? state
                : throw new SnapshotException(FormattableString.Invariant($"The snapshot's tensors have a transfer matrix of norm {norm} where 1 belongs."));
        }
        catch (Exception e) when (e is ArgumentException or IndexOutOfRangeException or OverflowException or InsufficientMemoryException)
        {
            throw new SnapshotException("The tensors and weights of the snapshot do not fit together.", e);
        }
    }

    /// <summary>Rescales a new state and makes it the present one; an exception leaves the flow as it was.</summary>
    private StepRecord Record(CoarseStep<T> result, long start)
    {
        int step = _records.Count;
        double vertices = Math.Pow(2, step), sites = vertices * _network.SitesPerTensor;
        Tensor<T> matrix = _scheme.TransferMatrix(result.State);
        double norm = Scale(step, result.State, matrix);
        NetworkState<T> state = _scheme.Rescale(result.State, 1 / norm);
        matrix = TensorAlgebra<T>.Scale(matrix, Scalar.FromReal<T>(1 / norm));
        CompensatedSum logScale = _logScale;
        logScale.Add(Math.Log(norm) / vertices);
        Complex trace = Scalar.ToComplex(TensorAlgebra<T>.Trace(matrix, [0], [1]).Elements[0]);
        CompensatedSum torus = logScale;
        torus.Add(Math.Log(trace.Magnitude) / vertices);
        double torusPerSite = torus.Value / _network.SitesPerTensor;
        (Leg vertical, Leg horizontal) = _scheme.Bonds(state);
        var record = new StepRecord
        {
            Step = step,
            LengthScale = Math.Sqrt(vertices),
            AspectRatio = _scheme.AspectRatio(step),
            SitesPerTensor = sites,
            VerticalBond = BondProfile.Of(vertical),
            HorizontalBond = BondProfile.Of(horizontal),
            DiscardedWeight = result.DiscardedWeight,
            LogZTorusPerSite = torusPerSite,
            TorusPhase = trace.Phase,
            LogZPerSite = BulkEstimate(step, torusPerSite),
            DegeneracyRatio = TransferSpectrum.DegeneracyRatio(matrix, trace),
            Spectrum = TransferSpectrum.Leading(matrix),
            Seconds = Stopwatch.GetElapsedTime(start).TotalSeconds,
            Notices = result.Notices,
        };
        (_state, _logScale) = (state, logScale);
        _records.Add(record);
        return record;
    }

    /// <summary>The norm of the transfer matrix; 1 where that is zero and the tensors are not: any scale serves there.</summary>
    private static double Scale(int step, NetworkState<T> state, Tensor<T> matrix)
    {
        double norm = TensorAlgebra<T>.Norm(matrix);
        if (norm > 0 && double.IsFinite(norm))
            return norm;
        if (norm == 0 && step <= LongestZero && state.Tensors.Values.All(static t => TensorAlgebra<T>.LargestMagnitude(t) > 0))
            return 1;
        throw new ArithmeticException($"Step {step}: the transfer matrix has norm {norm}. All weights cancel or vanish, or the numbers left the range of doubles.");
    }

    /// <summary>(ln Z' - ln Z) / (N' - N) from the last torus of the same shape: both carry the same universal factor.</summary>
    private double BulkEstimate(int step, double torusPerSite)
    {
        int earlier = step - _scheme.ShapePeriod;
        if (earlier < 0 || !double.IsFinite(torusPerSite) || !double.IsFinite(_records[earlier].LogZTorusPerSite))
            return double.NaN;
        double ratio = Math.Pow(2, _scheme.ShapePeriod);
        return torusPerSite + ((torusPerSite - _records[earlier].LogZTorusPerSite) / (ratio - 1));
    }
}
