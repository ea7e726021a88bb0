using System.Text.RegularExpressions;

namespace TensorRG.EndToEnd.Architecture;

/// <summary>House rules that the compiler does not check.</summary>
public sealed partial class SourceStyleTests
{
    private const int LongestFile = 400;

    /// <summary>Methods of more lines than this need a reason; those here have one.</summary>
    private const int LongestMethod = 60;

    private static readonly string[] LongMethods = [];

    public static IEnumerable<string> WrittenFiles => SourceTree.Files("src").Concat(SourceTree.Files("tests")).Where(static f => !f.EndsWith(".g.cs", StringComparison.Ordinal));

    [Fact]
    public void There_is_something_to_look_at() => Assert.True(WrittenFiles.Count() > 100);

    [Fact]
    public void No_file_is_longer_than_four_hundred_lines()
        => Assert.All(WrittenFiles, static f => Assert.True(SourceTree.Lines(f).Length <= LongestFile, $"{f} has {SourceTree.Lines(f).Length} lines"));

    /// <summary>Types that start in the first column; nested ones are indented.</summary>
    [Fact]
    public void A_file_holds_one_type_and_bears_its_name()
        => Assert.All(WrittenFiles.Where(static f => f.StartsWith("src/", StringComparison.Ordinal) && Path.GetFileName(f) != "Program.cs"), static f =>
        {
            string[] types = [.. SourceTree.Lines(f).Select(static line => TypeStart().Match(line)).Where(static m => m.Success).Select(static m => m.Groups["name"].Value)];
            Assert.True(types is [string name] && name == Path.GetFileNameWithoutExtension(f), $"{f} holds {string.Join(", ", types)}");
        });

    /// <summary>The room's namespace, or with the names of folders behind it.</summary>
    [Fact]
    public void Namespaces_are_file_scoped_and_follow_the_folders()
        => Assert.All(WrittenFiles.Where(static f => f.StartsWith("src/", StringComparison.Ordinal) && Path.GetFileName(f) != "Program.cs"), static f =>
        {
            string[] folders = f.Split('/')[1..^1];
            string[] allowed = [.. Enumerable.Range(1, folders.Length).Select(n => $"namespace {string.Join('.', folders[..n])};")];
            string[] found = [.. SourceTree.Lines(f).Where(static line => line.StartsWith("namespace", StringComparison.Ordinal))];
            Assert.True(found is [string name] && allowed.Contains(name), $"{f} holds {string.Join(", ", found)}");
        });

    /// <summary>A switched-off warning says why: on its own line, or in a comment just above.</summary>
    [Fact]
    public void Every_suppression_gives_its_reason()
        => Assert.All(WrittenFiles.Where(static f => !f.Contains("/Architecture/", StringComparison.Ordinal)), static f =>
        {
            string[] lines = SourceTree.Lines(f);
            for (int i = 0; i < lines.Length; i++)
            {
                if (!Suppression().IsMatch(lines[i]))
                    continue;
                bool reason = lines[i].Contains("//", StringComparison.Ordinal) || lines[i].Contains("Justification", StringComparison.Ordinal)
                    || (i > 0 && lines[i - 1].TrimStart().StartsWith("//", StringComparison.Ordinal));
                Assert.True(reason, $"{f}:{i + 1} switches a warning off without a reason");
            }
        });

    /// <summary>A method body starts with a brace four columns in and ends with one in the same column.</summary>
    [Fact]
    public void No_method_is_longer_than_sixty_lines()
        => Assert.All(WrittenFiles.Where(static f => f.StartsWith("src/", StringComparison.Ordinal)), static f =>
        {
            string[] lines = SourceTree.Lines(f);
            for (int i = 0, start = -1; i < lines.Length; i++)
            {
                if (lines[i] == "    {")
                    start = i;
                else if (lines[i] is "    }" or "    };" && start >= 0)
                    Assert.True(i - start - 1 <= LongestMethod || LongMethods.Contains($"{f}:{lines[start - 1].Trim()}") || IsType(lines, start), $"{f}:{start + 1} has {i - start - 1} lines: {lines[start - 1].Trim()}");
            }
        });

    private static bool IsType(string[] lines, int brace)
        => Enumerable.Range(1, Math.Min(4, brace)).Any(back => NestedType().IsMatch(lines[brace - back]));

    [GeneratedRegex(@"^(?:(?:public|internal|file|static|sealed|abstract|partial|readonly|unsafe|ref)\s+)*(?:class|struct|interface|enum|record(?:\s+(?:struct|class))?)\s+(?<name>\w+)")]
    private static partial Regex TypeStart();

    [GeneratedRegex(@"^    [\w ]*\b(?:class|struct|record|interface|enum)\b")]
    private static partial Regex NestedType();

    [GeneratedRegex(@"#pragma warning disable|\bSuppressMessage\b")]
    private static partial Regex Suppression();
}
