using System.Diagnostics;

namespace TensorRG.Runs.Tests;

public class KillTests
{
    private const int Steps = 40;
    private const int Kills = 8;

    [Fact]
    public void Real_process_killed_again_and_again_comes_to_the_same_bits()
    {
        using TemporaryFolder folder = new();
        Random random = new(7);
        string killed = folder.Sub("killed");
        for (int i = 0; i < Kills; i++)
        {
            Process child = ChildProcess.Start("run", killed, "40");
            Thread.Sleep(random.Next(0, 40));
            ChildProcess.Kill(child);
        }

        Sample.Run(RunFolder.Open(killed));
        string whole = folder.Sub("whole");
        Sample.Run(RunFolder.Create(whole, Sample.Inputs(Steps)));
        DiskFiles files = new();
        Assert.Equal(Sample.Fingerprint(files, whole, Steps), Sample.Fingerprint(files, killed, Steps));
        Assert.DoesNotContain(files.List(killed), n => n.EndsWith(".tmp", StringComparison.Ordinal));
    }
}
