using System.Diagnostics;
using System.Globalization;

namespace TensorRG.Runs.Tests;

/// <summary>A second real process: this assembly, started on its own <c>Main</c>.</summary>
internal static class ChildProcess
{
    private const int StepMilliseconds = 3;

    public static async Task<int> Main(string[] args)
    {
        if (args is ["hold", var locked])
        {
            using RunLock held = RunLock.Take(locked);
            Console.WriteLine("holding");
            await Task.Delay(TimeSpan.FromMinutes(1));
            return 0;
        }

        RunFolder folder = RunFolder.OpenOrCreate(args[1], Sample.Inputs(int.Parse(args[2], CultureInfo.InvariantCulture)));
        RunOptions options = new() { Checkpoints = Sample.EveryStep, Started = _ => Console.WriteLine("running") };
        RunDriver.Run(folder, () => new FakeFlow(folder.Inputs.Seed, StepMilliseconds), Sample.Summarize, options);
        Console.WriteLine("done");
        return 0;
    }

    /// <summary>Starts a child and waits for its first line.</summary>
    public static Process Start(params string[] args)
    {
        ProcessStartInfo info = new(Environment.ProcessPath!.EndsWith("dotnet", StringComparison.Ordinal) ? Environment.ProcessPath : "dotnet")
        {
            RedirectStandardOutput = true,
        };
        info.ArgumentList.Add(typeof(ChildProcess).Assembly.Location);
        foreach (string arg in args)
            info.ArgumentList.Add(arg);
        Process process = Process.Start(info)!;
        process.StandardOutput.ReadLine();
        return process;
    }

    /// <summary>SIGKILL, and the end of the process.</summary>
    public static void Kill(Process process)
    {
        process.Kill();
        process.WaitForExit();
        process.Dispose();
    }
}
