using System.Runtime.CompilerServices;
using System.Text;

namespace TensorRG.Reports.Tests;

/// <summary>Compares a report with the committed file byte for byte; on a mismatch writes .new beside it, to be looked at and renamed.</summary>
public static class Golden
{
    public static void Verify(string name, string actual)
    {
        var path = Path.Combine(Folder(), name);
        var bytes = Encoding.UTF8.GetBytes(actual);
        if (File.Exists(path) && File.ReadAllBytes(path).AsSpan().SequenceEqual(bytes)) return;
        File.WriteAllBytes(path + ".new", bytes);
        Assert.Fail($"{name} differs from the committed file; see {path}.new");
    }

    private static string Folder([CallerFilePath] string source = "") => Path.Combine(Path.GetDirectoryName(source)!, "Golden");
}
