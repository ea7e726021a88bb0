using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs.Tests;

/// <summary>
/// A deterministic stand-in for a coarse-graining flow: a chaotic map on an array, driven by a random generator whose
/// state is part of the snapshot. Losing any bit of the state changes all later numbers.
/// </summary>
internal sealed class FakeFlow : IFlow
{
    private const int Size = 64;
    private readonly List<StepRecord> _records = [];
    private readonly int _delayMilliseconds;
    private double[] _tensor = new double[Size];
    private ulong _random;

    public FakeFlow(long seed, int delayMilliseconds = 0)
    {
        _random = (ulong)seed;
        _delayMilliseconds = delayMilliseconds;
        for (int i = 0; i < Size; i++)
            _tensor[i] = NextUniform();
        _records.Add(Describe());
    }

    public int FailAtStep { get; init; } = -1;

    public int Step { get; private set; }

    public IReadOnlyList<StepRecord> Records => _records;

    public StepRecord Advance()
    {
        if (Step == FailAtStep)
            throw new ArithmeticException("The decomposition did not converge.");
        if (_delayMilliseconds > 0)
            Thread.Sleep(_delayMilliseconds);
        for (int i = 0; i < Size; i++)
            _tensor[i] = 3.9 * _tensor[i] * (1 - _tensor[i]) * (0.9 + (0.1 * NextUniform()));
        Step++;
        _records.Add(Describe());
        return _records[^1];
    }

    public Snapshot Save() => new(
        Step,
        new Dictionary<string, double[]>
        {
            ["tensors/site/elements"] = [.. _tensor],
            ["records/log_z"] = [.. _records.Select(r => r.LogZPerSite)],
            ["records/values"] = [.. _records.SelectMany(r => new[] { r.LogZTorusPerSite, r.DegeneracyRatio })],
            ["odd/empty"] = [],
            ["odd/bits"] = [BitConverter.Int64BitsToDouble(0x7ff8_dead_beef_0001), -0.0, double.NegativeInfinity, double.Epsilon],
        },
        new Dictionary<string, long[]>
        {
            ["random/state"] = [(long)_random],
            ["tensors/site/charges"] = [0, 1, -1, long.MinValue, long.MaxValue],
        },
        new Dictionary<string, string> { ["notes/text"] = "β = 0.44, „critical“ 𝄞\n", ["notes/none"] = "" });

    public void Restore(Snapshot snapshot)
    {
        Step = snapshot.Step;
        _tensor = [.. snapshot.Numbers["tensors/site/elements"]];
        _random = (ulong)snapshot.Integers["random/state"][0];
        double[] logZ = snapshot.Numbers["records/log_z"];
        double[] values = snapshot.Numbers["records/values"];
        _records.Clear();
        for (int i = 0; i <= Step; i++)
            _records.Add(Record(i, logZ[i], values[2 * i], values[(2 * i) + 1]) with { Seconds = double.NaN });
    }

    private StepRecord Describe() => Record(Step, Step == 0 ? double.NaN : _tensor.Sum() / Size, _tensor[0], 1 / _tensor[1]);

    private static StepRecord Record(int step, double logZ, double torus, double ratio) => new()
    {
        Step = step,
        LengthScale = Math.Pow(2, step / 2.0),
        AspectRatio = 1,
        SitesPerTensor = Math.Pow(2, step),
        VerticalBond = [new SectorSize("0", 3 + step), new SectorSize("(1,-2)", 4)],
        HorizontalBond = [new SectorSize("0", 1)],
        DiscardedWeight = 1e-17 * step,
        LogZTorusPerSite = torus,
        TorusPhase = -0.0,
        LogZPerSite = logZ,
        DegeneracyRatio = ratio,
        Spectrum = [new SpectrumLine("0", 1, 0), new SpectrumLine("(1,-2)", torus / 7, Math.PI)],
        Seconds = 1e-3 + Random.Shared.NextDouble(),
        Notices = Notices(step),
    };

    private static ImmutableArray<string> Notices(int step) => step % 3 == 2
        ? ["cut inside a multiplet: 50% of \"0\"; see log", string.Create(CultureInfo.InvariantCulture, $"step {step}\nβ")]
        : [];

    private double NextUniform()
    {
        _random = BitOperations.RotateLeft(_random * 0x9E37_79B9_7F4A_7C15, 29) + 0x1234_5678_9ABC_DEF1;
        return (_random >> 11) * Math.Pow(2, -53);
    }
}
