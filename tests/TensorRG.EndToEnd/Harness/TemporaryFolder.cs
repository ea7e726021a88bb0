namespace TensorRG.EndToEnd.Harness;

/// <summary>A folder of its own for one test, removed at the end.</summary>
public sealed class TemporaryFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("tensorrg-e2e-").FullName;

    public string Sub(string name) => System.IO.Path.Combine(Path, name);

    /// <summary>Copies a run folder, so that one stored run serves many tests.</summary>
    public string Copy(string folder, string name)
    {
        string target = Directory.CreateDirectory(Sub(name)).FullName;
        CopyInto(folder, target);
        return target;
    }

    public static void CopyInto(string folder, string target)
    {
        foreach (string file in Directory.GetFiles(folder))
            File.Copy(file, System.IO.Path.Combine(target, System.IO.Path.GetFileName(file)), overwrite: true);
    }

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
