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
        CoarseStep<T> result = _scheme.Step(_state, Step + 1);
        foreach (Tensor<T> tensor in _state.Tensors.Values)
            tensor.Dispose();
        return Record(result, start);
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
        _state = StateCodec.Read<T>(reader, _network.Site.Legs[0].Group);
        _logScale = new CompensatedSum(sum[0], sum[1]);
        _records.Clear();
        _records.AddRange(records);
    }

    private StepRecord Record(CoarseStep<T> result, long start)
    {
        int step = _records.Count;
        double vertices = Math.Pow(2, step), sites = vertices * _network.SitesPerTensor;
        Tensor<T> matrix = _scheme.TransferMatrix(result.State);
        double norm = TensorAlgebra<T>.Norm(matrix);
        if (!(norm > 0) || !double.IsFinite(norm))
            throw new ArithmeticException($"Step {step}: the transfer matrix has norm {norm}. All weights cancel or vanish, or the numbers left the range of doubles.");
        _state = _scheme.Rescale(result.State, 1 / norm);
        matrix = TensorAlgebra<T>.Scale(matrix, Scalar.FromReal<T>(1 / norm));
        _logScale.Add(Math.Log(norm) / vertices);
        Complex trace = Scalar.ToComplex(TensorAlgebra<T>.Trace(matrix, [0], [1]).Elements[0]);
        CompensatedSum torus = _logScale;
        torus.Add(Math.Log(trace.Magnitude) / vertices);
        double torusPerSite = torus.Value / _network.SitesPerTensor;
        (Leg vertical, Leg horizontal) = _scheme.Bonds(_state);
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
        _records.Add(record);
        return record;
    }

    /// <summary>(ln Z' - ln Z) / (N' - N) from the last torus of the same shape: both carry the same universal factor.</summary>
    private double BulkEstimate(int step, double torusPerSite)
    {
        int earlier = step - _scheme.ShapePeriod;
        if (earlier < 0)
            return double.NaN;
        double ratio = Math.Pow(2, _scheme.ShapePeriod);
        return torusPerSite + ((torusPerSite - _records[earlier].LogZTorusPerSite) / (ratio - 1));
    }
}
