using System.Text.Json.Nodes;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs.Tests;

/// <summary>The run that most tests use, and how to look at what it left.</summary>
internal static class Sample
{
    public const int Steps = 6;

    public static RunInputs Inputs(int steps = Steps, long seed = 42) => new()
    {
        Model = "ising",
        Parameters = RunInputs.Empty.Add("temperature", 2.269185314213022).Add("J", 1).Add("boundary", "periodic"),
        Scheme = "trg",
        SchemeOptions = RunInputs.Empty.Add("exponent", -0.5),
        BondDimension = 16,
        Steps = steps,
        Seed = seed,
        MultipletGap = 1e-8,
        Graded = true,
        ElementType = "double",
        Backend = "managed",
        NumericsVersion = 1,
    };

    public static JsonObject Summarize(IFlow flow) => new()
    {
        ["logZPerSite"] = flow.Records[^1].LogZPerSite,
        ["steps"] = flow.Step,
        ["torus"] = new JsonArray([.. flow.Records.Select(r => (JsonNode?)r.LogZTorusPerSite)]),
    };

    public static CheckpointPolicy EveryStep => new(share: 1);

    public static RunOutcome Run(RunFolder folder, RunOptions? options = null, CancellationToken stop = default) =>
        RunDriver.Run(
            folder,
            () => new FakeFlow(folder.Inputs.Seed),
            Summarize,
            options ?? new RunOptions { Checkpoints = EveryStep },
            stop);

    /// <summary>Everything that must not depend on interruptions: result, last checkpoint, and flow.csv without times.</summary>
    public static string Fingerprint(IRunFiles files, string folder, int steps = Steps) => string.Join(
        '\n',
        Convert.ToHexString(files.Read(Path.Combine(folder, "result.json"))),
        Convert.ToHexString(files.Read(Path.Combine(folder, RunFiles.State(steps)))),
        WithoutTimes(files.Read(Path.Combine(folder, "flow.csv"))));

    public static string WithoutTimes(byte[] flow) => string.Join('\n', System.Text.Encoding.UTF8.GetString(flow).Split('\n')
        .Select(CsvLine.Split)
        .Select(cells => CsvLine.Join(cells.Where((_, i) => i != FlowRow.Columns.Count - 2))));
}
