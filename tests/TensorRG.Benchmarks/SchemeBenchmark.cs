using System.Diagnostics;
using System.Globalization;
using System.Text.Json;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Physics;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;
using TensorRG.Tensors.Kernels;

namespace TensorRG.Benchmarks;

/// <summary>
/// Whole computations: against the plain NumPy script (full decompositions, OpenBLAS underneath), and how time grows with the
/// bond dimension. Goals: at most 1/30 of the script's time at chi = 32; growth from 32 to 96 no faster than chi^5.3; 1 GiB at chi = 96.
/// </summary>
internal static class SchemeBenchmark
{
    private const double SpeedGoal = 30;
    private const double GrowthGoal = 5.3;
    private const double MemoryGoal = 1024;
    private const int Steps = 50;

    public static int Run()
    {
        bool met = AgainstNumPy();
        met &= Growth();
        return met ? 0 : 1;
    }

    private static bool AgainstNumPy()
    {
        string script = Path.Combine(RepositoryRoot(), "scripts", "numpy_reference.py");
        Compute(32, 12);
        double best = double.PositiveInfinity, reference = double.PositiveInfinity, value = 0, referenceValue = double.NaN;
        for (int i = 0; i < 3; i++)
        {
            (double seconds, value) = Compute(32, Steps);
            best = Math.Min(best, seconds);
            if (NumPy(script) is not var (time, result))
            {
                Console.WriteLine("NumPy: not found; install python3-numpy for the comparison.");
                return true;
            }

            reference = Math.Min(reference, time);
            referenceValue = result;
        }

        double ratio = reference / best;
        Write($"bond-weighted, chi = 32, {Steps} steps, square Ising at Tc, {Environment.ProcessorCount} threads each, best of 3 interleaved");
        Write($"  TensorRG            {best,8:0.000} s   ln Z per site {value:r}");
        Write($"  NumPy, full SVDs    {reference,8:0.000} s   ln Z per site {referenceValue:r}");
        Write($"  ratio {ratio:0.0}, goal {SpeedGoal}: {(ratio >= SpeedGoal ? "met" : "MISSED")}; values differ by {Math.Abs(value - referenceValue):e1}");
        return ratio >= SpeedGoal && Math.Abs(value - referenceValue) <= 1e-12;
    }

    private static bool Growth()
    {
        int[] bondDimensions = [16, 24, 32, 48, 64, 80, 96];
        var times = new Dictionary<int, double>();
        Write($"time per step at Tc, steps 14 to 16, a process each");
        double memory = 0;
        foreach (int bondDimension in bondDimensions)
        {
            (times[bondDimension], memory) = InOwnProcess(bondDimension);
            Write($"  chi = {bondDimension,3}  {times[bondDimension] * 1e3,9:0.0} ms   peak memory {memory,6:0} MiB");
        }

        double exponent = Math.Log(times[96] / times[32]) / Math.Log(3);
        Write($"  growth from 32 to 96 as chi^{exponent:0.00}, goal {GrowthGoal}: {(exponent <= GrowthGoal ? "met" : "MISSED")}");
        Write($"  memory at chi = 96 {memory:0} MiB, goal {MemoryGoal}: {(memory <= MemoryGoal ? "met" : "MISSED")}");
        return exponent <= GrowthGoal && memory <= MemoryGoal;
    }

    /// <summary>Seconds a step and peak memory in MiB, on standard output; what <see cref="InOwnProcess"/> starts.</summary>
    public static int OneSize(int bondDimension)
    {
        // Enough products and decompositions for the runtime to compile them for good.
        Flow(24, 40);
        Flow(Math.Min(bondDimension, 32), 40);
        IReadOnlyList<StepRecord> records = Flow(bondDimension, 16).Records;
        double peak = Process.GetCurrentProcess().PeakWorkingSet64 / 1048576.0;
        Write($"{records.Skip(13).Average(static r => r.Seconds):r} {peak:r}");
        return 0;
    }

    private static (double Seconds, double Memory) InOwnProcess(int bondDimension)
    {
        string[] arguments = [Environment.GetCommandLineArgs()[0], "one-size", bondDimension.ToString(CultureInfo.InvariantCulture)];
        using Process process = Process.Start(new ProcessStartInfo(Environment.ProcessPath!, arguments) { RedirectStandardOutput = true })!;
        string[] words = process.StandardOutput.ReadToEnd().Split();
        process.WaitForExit();
        return (double.Parse(words[0], CultureInfo.InvariantCulture), double.Parse(words[1], CultureInfo.InvariantCulture));
    }

    private static (double Seconds, double Value) Compute(int bondDimension, int steps)
    {
        long start = Stopwatch.GetTimestamp();
        double value = Flow(bondDimension, steps).Records[^1].LogZPerSite;
        return (Stopwatch.GetElapsedTime(start).TotalSeconds, value);
    }

    private static Flow<double> Flow(int bondDimension, int steps)
    {
        ParameterSet parameters = ModelCatalogue.Find("ising").CreateParameters();
        var algebra = new TensorAlgebra<double>(Backends.Create(Backends.Default, Environment.ProcessorCount));
        IScheme<double> scheme = SchemeRegistry.Default.Create(algebra, new SchemeSettings(new CutRule(bondDimension, 0)));
        var flow = new Flow<double>(scheme, NetworkTensors.Build<double>(parameters.Model.Network(parameters)));
        while (flow.Step < steps)
            flow.Advance();
        return flow;
    }

    private static (double Seconds, double Value)? NumPy(string script)
    {
        var start = new ProcessStartInfo("/usr/bin/python3", [script, "--chi", "32", "--steps", Steps.ToString(CultureInfo.InvariantCulture), "--scheme", "bond-weighted", "--json"])
        {
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        start.Environment.Remove("OPENBLAS_CORETYPE");
        start.Environment.Remove("OPENBLAS_L2_SIZE");
        try
        {
            using Process process = Process.Start(start)!;
            string output = process.StandardOutput.ReadToEnd();
            process.WaitForExit();
            if (process.ExitCode != 0)
                return null;
            using JsonDocument json = JsonDocument.Parse(output);
            return (json.RootElement.GetProperty("seconds").GetDouble(), json.RootElement.GetProperty("lnZPerSite").GetDouble());
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return null;
        }
    }

    private static string RepositoryRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "TensorRG.sln")))
            folder = folder.Parent;
        return folder?.FullName ?? Environment.CurrentDirectory;
    }

    private static void Write(FormattableString text) => Console.WriteLine(text.ToString(CultureInfo.InvariantCulture));
}
