using System.Xml.Linq;

namespace TensorRG.EndToEnd.Architecture;

/// <summary>The repository as the tests find it: walks up from the test assembly to the solution file.</summary>
internal static class SourceTree
{
    public static string Root { get; } = FindRoot();

    /// <summary>Names of the rooms under src, without the common prefix.</summary>
    public static IReadOnlyList<string> Rooms { get; } =
        [.. Directory.GetDirectories(Path.Combine(Root, "src")).Select(static path => Path.GetFileName(path)["TensorRG.".Length..]).Order(StringComparer.Ordinal)];

    /// <summary>All C# files of a folder of the repository, without build output, as paths relative to the root.</summary>
    public static IEnumerable<string> Files(string folder)
        => Directory.EnumerateFiles(Path.Combine(Root, folder), "*.cs", SearchOption.AllDirectories)
            .Select(static path => Path.GetRelativePath(Root, path).Replace('\\', '/'))
            .Where(static path => !path.Split('/').Any(static part => part is "bin" or "obj"))
            .Order(StringComparer.Ordinal);

    public static string[] Lines(string file) => File.ReadAllLines(Path.Combine(Root, file));

    /// <summary>Rooms that a room's project refers to directly.</summary>
    public static IReadOnlyList<string> References(string room)
        => [.. Project(room).Descendants("ProjectReference").Select(static e => Path.GetFileNameWithoutExtension(e.Attribute("Include")!.Value.Replace('\\', '/'))["TensorRG.".Length..])];

    /// <summary>Packages that a room's project refers to directly.</summary>
    public static IReadOnlyList<string> Packages(string room)
        => [.. Project(room).Descendants("PackageReference").Select(static e => e.Attribute("Include")!.Value)];

    private static XDocument Project(string room)
        => XDocument.Load(Path.Combine(Root, "src", "TensorRG." + room, $"TensorRG.{room}.csproj"));

    private static string FindRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "TensorRG.sln")))
            folder = folder.Parent;
        return folder?.FullName ?? throw new InvalidOperationException("The tests run outside the repository: there is no TensorRG.sln above them.");
    }
}
