using TensorRG.Models;
using TensorRG.Physics.Measurements;
using TensorRG.Runs.Points;

namespace TensorRG.Runs.Tests.Points;

/// <summary>On the real file system.</summary>
public sealed class SweepStoreTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Numbers_come_back_to_the_bit_and_failures_with_their_message()
    {
        SweepFolder folder = Create("a");
        SweepOutcome first = SweepSample.Run(folder);
        Assert.Equal((RunStatus.Completed, 6), (first.Status, first.Computed));
        SweepOutcome again = SweepSample.Run(SweepFolder.Open(folder.Path, SweepSample.Resolve), before: static _ => Assert.Fail("A stored point was computed again."));
        Assert.Equal((RunStatus.Completed, 6, 0), (again.Status, again.Done, again.Computed));
        for (int i = 0; i < 6; i++)
            AssertSame(first.Points[i], again.Points[i]);
        Assert.Equal("The iteration did not settle.", again.Points[2].Failure);
        Assert.True(double.IsNaN(again.Points[1].Measurement!.Values[0].Value.Value));
        Assert.True(double.IsNegative(again.Points[4].Measurement!.Values[0].ImaginaryPart));
    }

    [Fact]
    public void Number_of_workers_changes_no_bit()
    {
        SweepAxis many = new("h", ["h"], [.. Enumerable.Range(0, 100).Select(static i => i / 50.0)]);
        var prints = new List<string>();
        foreach (int workers in (int[])[1, 2, 7])
        {
            SweepFolder folder = Create(FormattableString.Invariant($"w{workers}"), SweepSample.Inputs(null, many));
            SweepSample.Run(folder, new SweepOptions { Concurrency = workers });
            prints.Add(SweepSample.Fingerprint(new DiskFiles(), folder.Path));
        }

        Assert.Single(prints.Distinct());
    }

    [Fact]
    public void Workers_do_work_at_the_same_time()
    {
        using var both = new Barrier(2);
        bool met = true;
        SweepSample.Run(Create("a"), new SweepOptions { Concurrency = 2 }, _ => met &= both.SignalAndWait(TimeSpan.FromSeconds(30)));
        Assert.True(met);
    }

    [Fact]
    public void Stopped_sweep_keeps_its_points_and_goes_on()
    {
        SweepFolder folder = Create("a");
        using var stop = new CancellationTokenSource();
        var options = new SweepOptions { PointDone = (index, _) => StopAt(index, 2, stop), Completed = static _ => Assert.Fail("It is not complete.") };
        SweepOutcome stopped = SweepDriver.Run(folder, static () => new FakeMeasurer(), options, stop.Token);
        Assert.Equal((RunStatus.Stopped, 3, 3), (stopped.Status, stopped.Done, stopped.Computed));
        SweepStart? start = null;
        SweepOutcome end = SweepSample.Run(folder, new SweepOptions { Started = s => start = s });
        Assert.Equal((3, 6), (start!.Done, start.Count));
        Assert.Equal((RunStatus.Completed, 3), (end.Status, end.Computed));
        SweepSample.Run(Create("whole"));
        Assert.Equal(SweepSample.Fingerprint(new DiskFiles(), _folder.Sub("whole")), SweepSample.Fingerprint(new DiskFiles(), folder.Path));
    }

    [Fact]
    public void Damaged_points_are_computed_again_with_a_notice_and_no_others()
    {
        SweepFolder folder = Create("a");
        SweepSample.Run(folder);
        string good = SweepSample.Fingerprint(new DiskFiles(), folder.Path);
        string point = Path.Combine(folder.PointsPath, "000003.json");
        byte[] bytes = File.ReadAllBytes(point);
        var random = new Random(5);
        foreach (byte[] damaged in Damages(bytes, random))
        {
            File.WriteAllBytes(point, damaged);
            SweepStart? start = null;
            var computed = new List<double>();
            SweepSample.Run(folder, new SweepOptions { Started = s => start = s }, computed.Add);
            Assert.Equal([0.3], computed);
            Assert.Contains("points/000003.json", Assert.Single(start!.Notices), StringComparison.Ordinal);
            Assert.Equal(good, SweepSample.Fingerprint(new DiskFiles(), folder.Path));
        }
    }

    [Fact]
    public void Point_of_another_place_or_sweep_is_not_taken()
    {
        SweepFolder folder = Create("a");
        SweepSample.Run(folder);
        string good = SweepSample.Fingerprint(new DiskFiles(), folder.Path);
        File.Copy(Path.Combine(folder.PointsPath, "000003.json"), Path.Combine(folder.PointsPath, "000004.json"), overwrite: true);
        SweepStart? start = null;
        SweepSample.Run(folder, new SweepOptions { Started = s => start = s });
        Assert.Contains("belongs to another measurement", Assert.Single(start!.Notices), StringComparison.Ordinal);
        Assert.Equal(good, SweepSample.Fingerprint(new DiskFiles(), folder.Path));
    }

    [Fact]
    public void Second_worker_on_the_folder_is_refused()
    {
        SweepFolder folder = Create("a");
        using RunLock held = RunLock.Take(folder.Path);
        Assert.Equal(RunStoreProblem.InUse, Assert.Throws<RunStoreException>(() => SweepSample.Run(folder)).Problem);
        Assert.False(Directory.Exists(folder.PointsPath));
    }

    [Fact]
    public void What_is_no_failure_of_a_point_ends_the_sweep_and_keeps_what_is_stored()
    {
        SweepFolder folder = Create("a");
        Assert.Throws<InvalidOperationException>(() => SweepSample.Run(folder, before: static h => Refuse(h == 0.3)));
        SweepStart? start = null;
        SweepSample.Run(folder, new SweepOptions { Started = s => start = s });
        Assert.Equal(3, start!.Done);
    }

    [Fact]
    public void Refusal_by_the_model_belongs_to_its_point()
    {
        SweepOutcome outcome = SweepSample.Run(Create("a"), before: static h => RefuseModel(h == 0.4));
        Assert.Equal("no such network", outcome.Points[4].Failure);
        Assert.Null(outcome.Points[5].Failure);
    }

    [Fact]
    public void Folder_of_other_things_is_refused()
    {
        Create("a");
        AssertProblem(RunStoreProblem.OtherInputs, "measurement.bondDimension is 32 in the folder, 8 asked for", () => Create("a", SweepSample.Inputs() with { Measurement = SweepSample.Inputs().Measurement with { BondDimension = 8 } }));
        SweepInputs potts = SweepSample.Inputs(null, new SweepAxis("q", ["q"], [2])) with
        {
            Measurement = new MeasurementInputs { Parameters = ModelCatalogue.Find("potts").CreateParameters(), Quantities = ["ln-z"] },
        };
        AssertProblem(RunStoreProblem.OtherInputs, "measurement.model is \"ising\" in the folder, \"potts\" asked for", () => Create("a", potts));
        RunFolder.Create(_folder.Sub("run"), Sample.Inputs());
        AssertProblem(RunStoreProblem.NotARun, "not empty", () => Create("run"));
        AssertProblem(RunStoreProblem.NotARun, "holds no run", () => RunFolder.Open(_folder.Sub("a")));
        File.WriteAllText(_folder.Sub("file"), "");
        AssertProblem(RunStoreProblem.NotARun, "is a file", () => Create("file"));
        Assert.True(SweepFolder.IsSweep(_folder.Sub("a")));
        Assert.False(SweepFolder.IsSweep(_folder.Sub("run")));
        Assert.False(SweepFolder.IsSweep(_folder.Sub("none")));
    }

    [Fact]
    public void Inputs_changed_by_hand_are_refused()
    {
        Create("a");
        string header = _folder.Sub("a/inputs.json"), text = File.ReadAllText(header);
        foreach (string edited in (string[])[text.Replace("\"seed\": 1", "\"seed\": 2", StringComparison.Ordinal), text[..40], "", "[]", "{}"])
        {
            File.WriteAllText(header, edited);
            AssertProblem(RunStoreProblem.Damaged, "inputs.json", () => SweepFolder.Open(_folder.Sub("a"), SweepSample.Resolve));
            AssertProblem(RunStoreProblem.Damaged, "inputs.json", () => Create("a"));
        }
    }

    [Fact]
    public void Other_numerics_version_is_refused()
        => AssertProblem(RunStoreProblem.OtherVersion, "numerics version 99", () => SweepSample.Run(Create("a", SweepSample.Inputs() with { NumericsVersion = 99 })));

    [Fact]
    public void Text_of_a_model_from_a_file_is_in_the_folder_and_reaches_the_resolver()
    {
        const string text = "name = \"χ\"\n";
        SweepSample.Run(Create("a", SweepSample.Inputs(text)));
        Assert.Equal(text, File.ReadAllText(_folder.Sub("a/model.toml")));
        string? seen = null;
        SweepFolder opened = SweepFolder.Open(_folder.Sub("a"), (name, definition) => SweepSample.Resolve(name, seen = definition));
        Assert.Equal(text, seen);
        Assert.Equal(0, SweepSample.Run(opened).Computed);
    }

    [Fact]
    public void Half_written_files_are_cleared_away_and_foreign_ones_are_not()
    {
        SweepFolder folder = Create("a");
        Directory.CreateDirectory(folder.PointsPath);
        string[] half = ["inputs.json.tmp", "sweep.csv.4711.tmp", "points/000001.json.tmp"], own = ["notes.txt", "plot.tmp", "points/mine.tmp"];
        foreach (string name in half.Concat(own))
            File.WriteAllText(Path.Combine(folder.Path, name), "x");
        SweepSample.Run(folder);
        Assert.All(half, name => Assert.False(File.Exists(Path.Combine(folder.Path, name)), name));
        Assert.All(own, name => Assert.True(File.Exists(Path.Combine(folder.Path, name)), name));
    }

    private SweepFolder Create(string name, SweepInputs? inputs = null) => SweepFolder.OpenOrCreate(_folder.Sub(name), inputs ?? SweepSample.Inputs());

    private static IEnumerable<byte[]> Damages(byte[] bytes, Random random)
    {
        yield return [];
        yield return [.. bytes, (byte)'\n'];
        yield return bytes[..^1];
        for (int i = 0; i < 20; i++)
        {
            byte[] flipped = [.. bytes];
            flipped[random.Next(bytes.Length)] ^= (byte)(1 << random.Next(8));
            yield return flipped;
            yield return bytes[..random.Next(bytes.Length)];
        }
    }

    private static void AssertSame(PointResult expected, PointResult actual)
    {
        // Records of arrays compare by reference; the text of the file is the complete content.
        ParameterSet parameters = SweepSample.Inputs().At(0).Parameters;
        Assert.Equal(PointFile.Write("x", parameters, expected), PointFile.Write("x", parameters, actual));
        Assert.Equal(expected.Measurement?.Values[0].Value.Value, actual.Measurement?.Values[0].Value.Value);
        Assert.Equal(expected.Measurement?.Values[1].Value.Error, actual.Measurement?.Values[1].Value.Error);
        Assert.Equal(expected.Measurement?.Remarks[0], actual.Measurement?.Remarks[0]);
    }

    private static void StopAt(int index, int last, CancellationTokenSource stop)
    {
        if (index == last)
            stop.Cancel();
    }

    private static void Refuse(bool now)
    {
        if (now)
            throw new InvalidOperationException("broken");
    }

    private static void RefuseModel(bool now)
    {
        if (now)
            throw new ModelException("no such network");
    }

    private static void AssertProblem(RunStoreProblem problem, string text, Action act)
    {
        RunStoreException error = Assert.Throws<RunStoreException>(act);
        Assert.Equal(problem, error.Problem);
        Assert.Contains(text, error.Message, StringComparison.Ordinal);
    }
}
