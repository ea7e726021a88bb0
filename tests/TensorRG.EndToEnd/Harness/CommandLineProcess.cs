using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;

namespace TensorRG.EndToEnd.Harness;

/// <summary>The real executable, started as a process of its own.</summary>
internal sealed class CommandLineProcess : IDisposable
{
    private static readonly TimeSpan Limit = TimeSpan.FromMinutes(3);
    private readonly Process _process;
    private readonly string _command;
    private readonly Task<string> _out;
    private readonly Task<string> _error;

    private CommandLineProcess(Process process, string command)
    {
        _process = process;
        _command = command;
        _out = process.StandardOutput.ReadToEndAsync();
        _error = process.StandardError.ReadToEndAsync();
    }

    /// <summary>Beside the tests: the project reference copies it.</summary>
    public static string Executable { get; } =
        Path.Combine(AppContext.BaseDirectory, OperatingSystem.IsWindows() ? "tensorrg.exe" : "tensorrg");

    public int Id => _process.Id;

    /// <summary>Starts the executable.</summary>
    /// <param name="folder">Working folder.</param>
    /// <param name="args">Arguments.</param>
    /// <param name="environment">Variables to add.</param>
    /// <param name="launcher">A program and its arguments that starts the executable in its place; empty for none.</param>
    public static CommandLineProcess Start(
        string folder, IReadOnlyList<string> args, IReadOnlyDictionary<string, string>? environment = null, params string[] launcher)
    {
        string[] words = [.. launcher, Executable, .. args];
        ProcessStartInfo info = new(words[0], words[1..])
        {
            WorkingDirectory = folder,
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        info.Environment["DOTNET_ROOT"] = Path.GetFullPath(Path.Combine(RuntimeEnvironment.GetRuntimeDirectory(), "../../.."));
        info.Environment.Remove("TENSORRG_SIMD");
        foreach ((string name, string value) in environment ?? new Dictionary<string, string>())
            info.Environment[name] = value;
        Process process = Process.Start(info)!;
        process.StandardInput.Close();
        return new CommandLineProcess(process, "tensorrg " + string.Join(' ', args.Select(Quote)));
    }

    /// <summary>Runs the executable to its end.</summary>
    public static ProcessOutcome Run(string folder, params string[] args)
    {
        using CommandLineProcess process = Start(folder, args);
        return process.End();
    }

    /// <summary>Waits for the end; a process that does not come to it fails the test.</summary>
    public ProcessOutcome End()
    {
        if (!_process.WaitForExit(Limit))
        {
            Kill();
            Assert.Fail($"The process did not end within {Limit}.\n{Outcome()}");
        }

        return Outcome();
    }

    /// <summary>Whether the process ends within a time.</summary>
    public bool EndsWithin(TimeSpan time) => _process.WaitForExit(time);

    /// <summary>Waits until something is so, with as little delay as possible.</summary>
    /// <returns>False if the process ended before.</returns>
    public bool WaitUntil(Func<bool> condition)
    {
        long begin = Stopwatch.GetTimestamp();
        SpinWait spin = default;
        while (!condition())
        {
            if (_process.HasExited)
                return condition();
            Assert.True(Stopwatch.GetElapsedTime(begin) < Limit, $"It took too long.\n{_command}");
            spin.SpinOnce(sleep1Threshold: 1000);
        }

        return true;
    }

    /// <summary>SIGKILL: the process gets no chance to do anything more.</summary>
    /// <returns>Whether it was still alive.</returns>
    public bool Kill()
    {
        _process.Kill();
        _process.WaitForExit();
        return _process.ExitCode == 128 + 9;
    }

    /// <summary>Sends a signal by name, such as TERM.</summary>
    public void Signal(string name)
    {
        using Process kill = Process.Start("/bin/sh", ["-c", string.Create(CultureInfo.InvariantCulture, $"kill -{name} {Id}")]);
        kill.WaitForExit();
        Assert.Equal(0, kill.ExitCode);
    }

    public void Dispose()
    {
        if (!_process.HasExited)
            Kill();
        _process.Dispose();
    }

    private ProcessOutcome Outcome() => new(_command, _process.ExitCode, _out.Result, _error.Result);

    private static string Quote(string word) => word.Length > 0 && !word.Contains(' ', StringComparison.Ordinal) ? word : $"'{word}'";
}
