using System.ComponentModel;
using System.Diagnostics;
using System.Runtime.CompilerServices;

namespace TensorRG.Tensors.Tests.Kernels;

public class MicroKernelGeneratorTests
{
    [SkippableFact]
    public void The_committed_kernels_are_what_the_script_writes()
    {
        string script = Path.Combine(SourceFolder(), "../../../scripts/generate-microkernels");
        using Process? process = Start(script);
        Skip.If(process is null, "python3 is not installed");
        string errors = process.StandardError.ReadToEnd();
        process.WaitForExit();
        Assert.True(process.ExitCode == 0, errors);
    }

    private static Process? Start(string script)
    {
        try
        {
            return Process.Start(new ProcessStartInfo("python3", [script, "--check"]) { RedirectStandardError = true });
        }
        catch (Win32Exception)
        {
            return null;
        }
    }

    private static string SourceFolder([CallerFilePath] string file = "") => Path.GetDirectoryName(file)!;
}
