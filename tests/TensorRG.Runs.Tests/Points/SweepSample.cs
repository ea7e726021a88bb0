using System.Security.Cryptography;
using TensorRG.Models;
using TensorRG.Physics.Measurements;
using TensorRG.Runs.Points;

namespace TensorRG.Runs.Tests.Points;

/// <summary>A small sweep.</summary>
internal static class SweepSample
{
    public static Model Ising { get; } = ModelCatalogue.Find("ising");

    public static SweepAxis Fields { get; } = new("h", ["h"], [0, 0.1, 0.2, 0.3, 0.4, 0.5]);

    public static SweepInputs Inputs(string? definition = null, params SweepAxis[] axes) => new()
    {
        Measurement = new MeasurementInputs { Parameters = Ising.CreateParameters([KeyValuePair.Create("temperature", 2.5)]), Quantities = ["ln-z", "energy"] },
        Definition = definition,
        Axes = axes.Length == 0 ? [Fields] : [.. axes],
        Backend = "managed",
        NumericsVersion = FlowFactory.NumericsVersion,
    };

    /// <summary>The model, whatever the definition.</summary>
    public static Model Resolve(string name, string? definition) => ModelCatalogue.Find(name);

    public static SweepOutcome Run(SweepFolder folder, SweepOptions? options = null, Action<double>? before = null)
        => SweepDriver.Run(folder, () => new FakeMeasurer(before), options ?? new SweepOptions());

    /// <summary>Checksum over all points.</summary>
    public static string Fingerprint(IRunFiles files, string folder)
    {
        string points = Path.Combine(folder, "points");
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        foreach (string name in files.List(points).Order(StringComparer.Ordinal))
        {
            hash.AppendData(System.Text.Encoding.UTF8.GetBytes(name));
            hash.AppendData(files.Read(Path.Combine(points, name)));
        }

        return Convert.ToHexString(hash.GetCurrentHash());
    }
}
