using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;
using System.Text;

namespace TensorRG.Runs.Tests;

/// <summary>A run is read with Python's json, pandas and h5py alone.</summary>
public class PythonTests
{
    [SkippableFact]
    public void Identity_and_seals_are_recomputed_with_the_standard_library()
    {
        using TemporaryFolder folder = new();
        RunFolder run = Finish(folder);
        AssertPython("json", folder, """
            import hashlib, json, sys
            canonical = lambda x: json.dumps(x, sort_keys=True, separators=(",", ":"), ensure_ascii=False).encode()
            sha = lambda x: hashlib.sha256(x).hexdigest()
            run = json.load(open("a/run.json", encoding="utf-8"))
            result = json.load(open("a/result.json", encoding="utf-8"))
            assert sha(canonical(run["inputs"])) == run["identity"] == result["identity"] == sys.argv[1]
            for sealed in run, result:
                assert sealed.pop("sha256") == sha(canonical(sealed))
            state = open("a/state-000006.h5", "rb").read()
            assert b"\nsha256 " + sha(state[512:]).encode() + b"\n" in state[:512]
            print(repr(result["result"]["logZPerSite"]))
            """,
            run.Identity, NumberText.Of(run.ReadResult()!["logZPerSite"]!.GetValue<double>()));
    }

    [SkippableFact]
    public void Reals_are_spelled_as_python_spells_them()
    {
        using TemporaryFolder folder = new();
        Random random = new(11);
        double[] values = [.. Enumerable.Range(0, 20000).Select(i => i % 2 == 0
            ? BitConverter.Int64BitsToDouble(random.NextInt64(0x7FE0_0000_0000_0000))
            : random.Next(1, 100000) * Math.Pow(10, random.Next(-12, 20)))];
        File.WriteAllBytes(folder.Sub("bits"), MemoryMarshal.AsBytes(values.AsSpan()));
        File.WriteAllLines(folder.Sub("texts"), values.Select(NumberText.Of));
        AssertPython("json", folder, """
            import struct
            bits = open("bits", "rb").read()
            texts = open("texts").read().split()
            values = struct.unpack("<%dd" % (len(bits) // 8), bits)
            print(sum(repr(v) == t for v, t in zip(values, texts)))
            """, "", values.Length.ToString(CultureInfo.InvariantCulture));
    }

    [SkippableFact]
    public void Checkpoint_is_read_with_h5py()
    {
        using TemporaryFolder folder = new();
        RunFolder run = Finish(folder);
        AssertPython("h5py", folder, """
            import sys, h5py, numpy
            f = h5py.File("a/state-000006.h5", "r")
            assert f.attrs["identity"] == sys.argv[1] and f.attrs["step"] == 6 and f.attrs["schema"] == 1
            assert f["tensors/site/elements"].dtype == numpy.float64 and f["tensors/site/elements"].shape == (64,)
            assert list(f["tensors/site/charges"]) == [0, 1, -1, -2**63, 2**63 - 1]
            assert f["odd/bits"][()].view(numpy.uint64)[0] == 0x7ff8deadbeef0001
            assert f["odd/empty"].shape == (0,) and f["notes/none"][()] == b""
            assert f["notes/text"].asstr()[()] == "\u03b2 = 0.44, \u201ecritical\u201c \U0001D11E\n"
            print(repr(float(f["records/log_z"][-1])))
            """,
            run.Identity, NumberText.Of(run.ReadResult()!["logZPerSite"]!.GetValue<double>()));
    }

    [SkippableFact]
    public void Flow_table_is_read_with_pandas()
    {
        using TemporaryFolder folder = new();
        RunFolder run = Finish(folder);
        AssertPython("pandas", folder, """
            import math, pandas
            flow = pandas.read_csv("a/flow.csv", float_precision="round_trip", dtype={"vertical_bond": str, "spectrum": str})
            assert list(flow.step) == [0, 1, 2, 3, 4, 5, 6]
            assert math.isnan(flow.log_z_per_site[0]) and (flow.seconds > 0).all()
            bond = dict(item.rsplit(":", 1) for item in flow.vertical_bond[6].split(";"))
            assert bond == {"0": "9", "(1,-2)": "4"}
            assert [float(line.split(":")[2]) for line in flow.spectrum[6].split(";")] == [0, math.pi]
            print(repr(float(flow.log_z_per_site[6])))
            """,
            "", NumberText.Of(run.ReadResult()!["logZPerSite"]!.GetValue<double>()));
    }

    private static RunFolder Finish(TemporaryFolder folder)
    {
        RunFolder run = RunFolder.Create(
            folder.Sub("a"),
            Sample.Inputs() with { Parameters = RunInputs.Empty.Add("β", 1e-8).Add("big", 1e22).Add("quote", "\"\\\n\u0001é") },
            new Dictionary<string, string> { ["program"] = "test" });
        Sample.Run(run);
        return run;
    }

    /// <summary>Runs a script in the folder and compares what it prints.</summary>
    private static void AssertPython(string module, TemporaryFolder folder, string script, string argument, string expected)
    {
        string? python = new[] { "python3", "/usr/bin/python3" }.FirstOrDefault(p => Run(p, folder, "-c", "import " + module).Code == 0);
        Skip.If(python is null, $"There is no python3 with the module {module}.");
        File.WriteAllText(folder.Sub("script.py"), script, new UTF8Encoding(false));
        (int code, string output) = Run(python, folder, "script.py", argument);
        Assert.True(code == 0, output);
        Assert.Equal(expected, output.Trim());
    }

    private static (int Code, string Output) Run(string python, TemporaryFolder folder, params string[] args)
    {
        ProcessStartInfo info = new(python, args)
        {
            WorkingDirectory = folder.Path,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        try
        {
            using Process process = Process.Start(info)!;
            Task<string> errors = process.StandardError.ReadToEndAsync();
            string output = process.StandardOutput.ReadToEnd();
            process.WaitForExit();
            return (process.ExitCode, output + errors.Result);
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return (-1, "");
        }
    }
}
