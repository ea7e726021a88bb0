using System.Xml.Linq;

namespace TensorRG.EndToEnd.Architecture;

/// <summary>The solution, the pinned packages and the project settings.</summary>
public sealed class RepositoryTests
{
    [Fact]
    public void The_solution_holds_every_project()
    {
        string solution = File.ReadAllText(Path.Combine(SourceTree.Root, "TensorRG.sln")).Replace('\\', '/');
        Assert.All(Projects(), project => Assert.Contains(project, solution, StringComparison.Ordinal));
    }

    [Fact]
    public void Versions_are_pinned_in_one_place()
        => Assert.All(Projects(), static project => Assert.DoesNotContain(
            XDocument.Load(Path.Combine(SourceTree.Root, project)).Descendants("PackageReference"),
            static e => e.Attribute("Version") is not null || e.Attribute("VersionOverride") is not null));

    [Fact]
    public void Every_pinned_package_is_used_and_exact()
    {
        XDocument pinned = XDocument.Load(Path.Combine(SourceTree.Root, "Directory.Packages.props"));
        string all = string.Concat(Projects().Append("tests/Directory.Build.props").Select(static p => File.ReadAllText(Path.Combine(SourceTree.Root, p))));
        Assert.All(pinned.Descendants("PackageVersion"), e =>
        {
            Assert.Contains($"Include=\"{e.Attribute("Include")!.Value}\"", all, StringComparison.Ordinal);
            Assert.Matches(@"^\d+\.\d+\.\d+$", e.Attribute("Version")!.Value);
        });
    }

    /// <summary>Warnings are errors everywhere: no project softens that.</summary>
    [Fact]
    public void No_project_turns_warnings_off_in_src()
        => Assert.All(Projects().Where(static p => p.StartsWith("src/", StringComparison.Ordinal)), static project => Assert.DoesNotContain(
            XDocument.Load(Path.Combine(SourceTree.Root, project)).Descendants(),
            static e => e.Name.LocalName is "NoWarn" or "TreatWarningsAsErrors" or "Nullable" or "WarningsNotAsErrors"));

    private static IEnumerable<string> Projects()
        => Directory.EnumerateFiles(SourceTree.Root, "*.csproj", SearchOption.AllDirectories)
            .Select(static path => Path.GetRelativePath(SourceTree.Root, path).Replace('\\', '/'))
            .Where(static path => path.StartsWith("src/", StringComparison.Ordinal) || path.StartsWith("tests/", StringComparison.Ordinal));
}
