namespace TensorRG.Runs.Tests;

/// <summary>A folder of the real file system, removed at the end.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("tensorrg-runs-").FullName;

    public string Sub(string name) => System.IO.Path.Combine(Path, name);

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
