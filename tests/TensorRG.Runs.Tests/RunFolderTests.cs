using System.Text.Json.Nodes;

namespace TensorRG.Runs.Tests;

/// <summary>On the real file system.</summary>
public sealed class RunFolderTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    private string RunJson => _folder.Sub("a/run.json");

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Created_run_opens_with_its_inputs_and_labels()
    {
        Dictionary<string, string> labels = new() { ["threads"] = "2", ["created"] = "2026-12-01T06:05:33Z" };
        RunFolder created = RunFolder.Create(_folder.Sub("a"), Sample.Inputs(), labels);
        RunFolder opened = RunFolder.Open(_folder.Sub("a"));
        Assert.Equal(Sample.Inputs(), opened.Inputs);
        Assert.Equal(created.Identity, opened.Identity);
        Assert.Equal("2", opened.Labels["threads"]);
        Assert.Equal(["created", "threads"], opened.Labels.Keys);
        Assert.Null(opened.ReadResult());
    }

    [Fact]
    public void Labels_do_not_enter_the_identity()
    {
        RunFolder plain = RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        RunFolder labelled = RunFolder.Create(_folder.Sub("b"), Sample.Inputs(), new Dictionary<string, string> { ["threads"] = "2" });
        Assert.Equal(plain.Identity, labelled.Identity);
    }

    [Fact]
    public void Same_inputs_open_the_run_and_other_inputs_are_listed()
    {
        RunFolder.OpenOrCreate(_folder.Sub("a"), Sample.Inputs());
        Assert.Equal(Sample.Inputs(), RunFolder.OpenOrCreate(_folder.Sub("a"), Sample.Inputs()).Inputs);
        RunInputs other = Sample.Inputs(steps: 9) with { Parameters = Sample.Inputs().Parameters.Add("h", 0.5) };
        RunStoreException error = Assert.Throws<RunStoreException>(() => RunFolder.OpenOrCreate(_folder.Sub("a"), other));
        Assert.Equal(RunStoreProblem.OtherInputs, error.Problem);
        Assert.Contains("parameters.h is absent in the folder, 0.5 asked for; steps is 6 in the folder, 9 asked for", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Run_that_another_process_makes_meanwhile_is_opened()
    {
        string folder = _folder.Sub("raced");
        var files = new InterruptedFiles(new DiskFiles(), () => RunFolder.Create(folder, Sample.Inputs()));
        Assert.Equal(Sample.Inputs(), RunFolder.OpenOrCreate(files, folder, Sample.Inputs(), null).Inputs);
        string other = _folder.Sub("raced by other inputs");
        files = new InterruptedFiles(new DiskFiles(), () => RunFolder.Create(other, Sample.Inputs(steps: 9)));
        AssertProblem(RunStoreProblem.OtherInputs, "steps is 9", () => RunFolder.OpenOrCreate(files, other, Sample.Inputs(), null));
    }

    [Fact]
    public void Run_is_not_created_over_anything()
    {
        RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        AssertProblem(RunStoreProblem.NotARun, "not empty", () => RunFolder.Create(_folder.Sub("a"), Sample.Inputs()));
        File.WriteAllText(_folder.Sub("file"), "x");
        AssertProblem(RunStoreProblem.NotARun, "is a file", () => RunFolder.Create(_folder.Sub("file"), Sample.Inputs()));
        AssertProblem(RunStoreProblem.NotARun, "not empty", () => RunFolder.Create(_folder.Path, Sample.Inputs()));
        AssertProblem(RunStoreProblem.Storage, "file/b", () => RunFolder.Create(_folder.Sub("file/b"), Sample.Inputs()));
        AssertProblem(RunStoreProblem.NotARun, "is a file", () => RunFolder.Open(_folder.Sub("file")));
        AssertProblem(RunStoreProblem.NotARun, "no folder", () => RunFolder.Open(_folder.Sub("none")));
        AssertProblem(RunStoreProblem.NotARun, "holds no run", () => RunFolder.Open(_folder.Path));
    }

    [Fact]
    public void Missing_parents_are_made_and_leftovers_of_a_killed_creation_do_not_matter()
    {
        string path = Directory.CreateDirectory(_folder.Sub("x/y/z")).FullName;
        File.WriteAllText(Path.Combine(path, "run.lock"), "");
        File.WriteAllText(Path.Combine(path, "run.json.tmp"), "{ half");
        RunFolder.Create(path, Sample.Inputs());
        Assert.Equal(["run.json", "run.lock"], new DiskFiles().List(path).Order(StringComparer.Ordinal));
        Assert.Equal(Sample.Inputs(seed: 2), RunFolder.Create(_folder.Sub("p/q"), Sample.Inputs(seed: 2)).Inputs);
    }

    [Fact]
    public void Run_json_edited_by_hand_is_refused()
    {
        RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        string good = File.ReadAllText(RunJson);
        AssertEdited(good.Replace("\"bondDimension\": 16", "\"bondDimension\": 17", StringComparison.Ordinal), "inputs do not match its identity");
        AssertEdited(good.Replace("\"labels\": {}", "\"labels\": {\"threads\": \"4\"}", StringComparison.Ordinal), "checksum");
        AssertEdited(good.Replace("  ", "    ", StringComparison.Ordinal), "checksum");
        AssertEdited(good[..^20], "cannot be read");
        AssertEdited("", "cannot be read");
        AssertEdited("[1]", "cannot be read");
        AssertEdited("{}", "cannot be read");
    }

    [Fact]
    public void Inputs_with_a_new_identity_but_an_old_checksum_are_refused()
    {
        RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        string forged = File.ReadAllText(RunJson)
            .Replace("\"bondDimension\": 16", "\"bondDimension\": 17", StringComparison.Ordinal)
            .Replace(Sample.Inputs().Identity, (Sample.Inputs() with { BondDimension = 17 }).Identity, StringComparison.Ordinal);
        AssertEdited(forged, "checksum");
    }

    [Fact]
    public void Newer_schema_is_refused()
    {
        RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        JsonObject newer = JsonNode.Parse(File.ReadAllText(RunJson))!.AsObject();
        newer["schema"] = 2;
        newer.Remove("inputs");
        File.WriteAllText(RunJson, newer.ToJsonString());
        AssertProblem(RunStoreProblem.OtherVersion, "schema 2", () => RunFolder.Open(_folder.Sub("a")));
    }

    [Fact]
    public void Other_numerics_version_is_refused()
    {
        RunFolder run = RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        run.RequireNumericsVersion(1);
        AssertProblem(RunStoreProblem.OtherVersion, "numerics version 1; this program has 2", () => run.RequireNumericsVersion(2));
    }

    [Fact]
    public void Unrelated_files_in_a_run_are_left_alone()
    {
        RunFolder run = RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        string[] own = ["notes.txt", "plot.tmp", "state-1.h5", "state-000001.h5.bak", "state-000099.h5.damaged"];
        foreach (string name in own)
            File.WriteAllText(_folder.Sub("a/" + name), name);
        File.WriteAllText(_folder.Sub("a/state-000003.h5.tmp"), "half");
        Sample.Run(run);
        Assert.All(own, name => Assert.Equal(name, File.ReadAllText(_folder.Sub("a/" + name))));
        Assert.False(File.Exists(_folder.Sub("a/state-000003.h5.tmp")));
    }

    [Fact]
    public void Missing_flow_table_is_an_error_that_names_it()
    {
        RunFolder run = RunFolder.Create(_folder.Sub("a"), Sample.Inputs());
        AssertProblem(RunStoreProblem.Storage, "flow.csv", () => run.ReadFlow());
    }

    private static void AssertProblem(RunStoreProblem problem, string text, Action act)
    {
        RunStoreException error = Assert.Throws<RunStoreException>(act);
        Assert.Equal(problem, error.Problem);
        Assert.Contains(text, error.Message, StringComparison.Ordinal);
    }

    private void AssertEdited(string content, string why)
    {
        File.WriteAllText(RunJson, content);
        AssertProblem(RunStoreProblem.Damaged, why, () => RunFolder.Open(_folder.Sub("a")));
    }
}
