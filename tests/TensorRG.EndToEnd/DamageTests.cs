using System.Globalization;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>Files of a run that were truncated, altered or deleted: noticed, survived or refused, never a wrong number.</summary>
public sealed class DamageTests(StoppedRun stopped) : IClassFixture<StoppedRun>, IDisposable
{
    private static readonly Dictionary<string, Func<byte[], byte[]>> Damages = new()
    {
        ["empty"] = static _ => [],
        ["first bytes only"] = static bytes => bytes[..300],
        ["first half only"] = static bytes => bytes[..(bytes.Length / 2)],
        ["last byte missing"] = static bytes => bytes[..^1],
        ["a byte more"] = static bytes => [.. bytes, 0],
        ["bit flipped in the seal"] = static bytes => Flip(bytes, 40, 0),
        ["bit flipped in the checksum"] = static bytes => Flip(bytes, 130, 2),
        ["bit flipped at the start of the data"] = static bytes => Flip(bytes, 520, 3),
        ["bit flipped in the middle"] = static bytes => Flip(bytes, bytes.Length / 2, 5),
        ["bit flipped at the end"] = static bytes => Flip(bytes, bytes.Length - 1, 7),
        ["a page of zeros"] = static bytes => [.. bytes[..4096], .. new byte[4096], .. bytes[8192..]],
        ["all zeros"] = static bytes => new byte[bytes.Length],
        ["a text"] = static _ => "not a checkpoint\n"u8.ToArray(),
    };

    private readonly TemporaryFolder _folder = new();

    public static TheoryData<string> DamageNames => [.. Damages.Keys];

    public void Dispose() => _folder.Dispose();

    [Theory]
    [MemberData(nameof(DamageNames))]
    public void Damaged_checkpoint_is_passed_over_for_the_older_one(string damage)
    {
        RunFiles run = Copy();
        Change(run.State(stopped.Newer), Damages[damage]);
        AssertGoesOnFromOlder(run);
    }

    [Fact]
    public void Checkpoint_of_another_step_is_passed_over()
    {
        RunFiles run = Copy();
        File.Copy(run.State(stopped.Older), run.State(stopped.Newer), overwrite: true);
        AssertGoesOnFromOlder(run);
    }

    [Fact]
    public void Checkpoint_of_another_run_is_passed_over()
    {
        RunFiles run = Copy(), other = new(_folder.Sub("other"));
        RunSetup setup = StoppedRun.Setup with { StepCount = stopped.Newer };
        CommandLineProcess.Run(_folder.Path, setup.Run(other.Path)).Expect(0);
        File.Copy(other.State(stopped.Newer), run.State(stopped.Newer), overwrite: true);
        AssertGoesOnFromOlder(run);
    }

    [Fact]
    public void Deleted_newest_checkpoint_costs_time_alone()
    {
        RunFiles run = Copy();
        File.Delete(run.State(stopped.Newer));
        ProcessOutcome end = Resume(run).Expect(0);
        Assert.Contains(Says(stopped.Older), end.Out, StringComparison.Ordinal);
        AssertSame(run);
    }

    [Theory]
    [InlineData("a text")]
    [InlineData("empty")]
    [InlineData(null)]
    public void Older_checkpoint_is_not_needed(string? damage)
    {
        RunFiles run = Copy();
        if (damage is null)
            File.Delete(run.State(stopped.Older));
        else
            Change(run.State(stopped.Older), Damages[damage]);
        Assert.Contains(Says(stopped.Newer), Resume(run).Expect(0).Out, StringComparison.Ordinal);
        AssertSame(run);
    }

    [Fact]
    public void Both_checkpoints_damaged_is_an_error_that_changes_nothing_and_its_remedy_works()
    {
        RunFiles run = Copy();
        Change(run.State(stopped.Newer), Damages["bit flipped in the middle"]);
        Change(run.State(stopped.Older), Damages["first half only"]);
        Dictionary<string, byte[]> before = run.Content();
        ProcessOutcome refused = Resume(run).Expect(2).ExpectError(
            Path.GetFileName(run.State(stopped.Newer)), Path.GetFileName(run.State(stopped.Older)), run.Path, "delete the state files");
        Assert.Single(refused.ErrorLines);
        Assert.Equal(before, run.Content());

        File.Delete(run.State(stopped.Newer));
        File.Delete(run.State(stopped.Older));
        Assert.Contains("computed again", Resume(run).Expect(0).Out, StringComparison.Ordinal);
        AssertSame(run);
    }

    [Theory]
    [InlineData("empty")]
    [InlineData("last byte missing")]
    [InlineData("first half only")]
    [InlineData("bit flipped in the middle")]
    public void Damaged_flow_is_written_again_with_a_notice(string damage)
    {
        RunFiles run = Copy();
        Change(run.Flow, Damages[damage]);
        ProcessOutcome end = CommandLineProcess.Run(_folder.Path, [.. RunSetup.Resume(run.Path), "--quiet"]).Expect(0);
        end.ExpectError("flow.csv was damaged");
        AssertSame(run);
    }

    [Fact]
    public void Missing_flow_is_written_again()
    {
        RunFiles run = Copy();
        File.Delete(run.Flow);
        Resume(run).Expect(0);
        AssertSame(run);
    }

    [Theory]
    [InlineData("\"steps\": 24", "\"steps\": 23")]
    [InlineData("\"bondDimension\": 16", "\"bondDimension\": 17")]
    [InlineData("2.3", "2.4")]
    [InlineData("\"seed\": 1", "\"seed\": 2")]
    [InlineData("\"machine\": \"", "\"machine\": \"x")]
    [InlineData("\"schema\": 1", "\"schema\": 2")]
    [InlineData("{", "")]
    [InlineData("\n", "\n\n")]
    public void Edited_inputs_are_refused(string text, string replacement)
    {
        RunFiles run = Copy();
        string header = File.ReadAllText(run.Header);
        int at = header.IndexOf(text, StringComparison.Ordinal);
        Assert.True(at >= 0, header);
        File.WriteAllText(run.Header, string.Concat(header.AsSpan(0, at), replacement, header.AsSpan(at + text.Length)));
        Dictionary<string, byte[]> before = run.Content();
        ProcessOutcome refused = Resume(run).Expect(2).ExpectError(run.Header);
        Assert.Single(refused.ErrorLines);
        Assert.Empty(refused.Out);
        Assert.Equal(before, run.Content());
    }

    [Theory]
    [InlineData("empty")]
    [InlineData("bit flipped in the middle")]
    public void Damaged_result_is_written_again(string damage)
    {
        RunFiles run = new(_folder.Copy(stopped.Whole, "run"));
        Change(run.Result, Damages[damage]);
        Assert.Contains("result.json was damaged", Resume(run).Expect(0).Out, StringComparison.Ordinal);
        AssertSame(run);
    }

    [Fact]
    public void Edited_flow_of_a_finished_run_is_refused_and_the_remedy_works()
    {
        RunFiles run = new(_folder.Copy(stopped.Whole, "run"));
        Change(run.Flow, Damages["bit flipped in the middle"]);
        Resume(run).Expect(2).ExpectError(run.Flow, "Delete result.json and resume");
        File.Delete(run.Result);
        Resume(run).Expect(0);
        AssertSame(run);
    }

    private static string Says(int step) => string.Create(CultureInfo.InvariantCulture, $"Resumed after step {step}.");

    private static byte[] Flip(byte[] bytes, int index, int bit)
    {
        byte[] copy = [.. bytes];
        copy[index] ^= (byte)(1 << bit);
        return copy;
    }

    private static void Change(string file, Func<byte[], byte[]> damage) => File.WriteAllBytes(file, damage(File.ReadAllBytes(file)));

    private RunFiles Copy() => new(_folder.Copy(stopped.Path, "run"));

    private ProcessOutcome Resume(RunFiles run) => CommandLineProcess.Run(_folder.Path, RunSetup.Resume(run.Path));

    private void AssertGoesOnFromOlder(RunFiles run)
    {
        string name = Path.GetFileName(run.State(stopped.Newer));
        ProcessOutcome end = Resume(run).Expect(0);
        Assert.Contains($"Checkpoint {name} was passed over", end.Out, StringComparison.Ordinal);
        Assert.Contains(Says(stopped.Older), end.Out, StringComparison.Ordinal);
        Assert.True(run.HasAny(name + ".damaged"));
        AssertSame(run);
    }

    private void AssertSame(RunFiles run) => stopped.Bits.AssertSame(run.Path, "damaged");
}
