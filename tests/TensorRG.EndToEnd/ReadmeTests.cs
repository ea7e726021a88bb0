using System.Text;
using System.Text.RegularExpressions;
using TensorRG.EndToEnd.Harness;

namespace TensorRG.EndToEnd;

/// <summary>
/// Runs every <c>console</c> example of README.md, in order and in one folder, and compares what it prints, times and
/// processor apart; model files that it shows are saved first. With the environment variable TENSORRG_WRITE_README=1 the output is written into the file instead.
/// </summary>
public sealed partial class ReadmeTests
{
    private const string Fence = "```";
    private const string Prompt = "$ tensorrg ";

    [Fact]
    public void Examples_print_what_the_readme_shows()
    {
        string path = Path.Combine(Repository.Root, "README.md");
        string shown = File.ReadAllText(path);
        string real = WithRealOutput(shown);
        if (Environment.GetEnvironmentVariable("TENSORRG_WRITE_README") == "1")
            File.WriteAllText(path, real);
        else
            Assert.Equal(Comparable(real), Comparable(shown));
    }

    [Fact]
    public void The_examples_cover_every_command()
    {
        string shown = File.ReadAllText(Path.Combine(Repository.Root, "README.md"));
        foreach (string command in (string[])["run", "resume", "converge", "models", "measure", "sweep"])
            Assert.Contains($"\n{Prompt}{command}", shown, StringComparison.Ordinal);
    }

    private static string WithRealOutput(string readme)
    {
        using var folder = new TemporaryFolder();
        var text = new StringBuilder();
        bool inExample = false;
        WriteModels(folder, readme);
        foreach (string line in readme.TrimEnd('\n').Split('\n'))
        {
            if (line.StartsWith(Fence, StringComparison.Ordinal))
                inExample = line == Fence + "console";
            if (!inExample || line.StartsWith(Fence, StringComparison.Ordinal))
                text.Append(line).Append('\n');
            else if (line.StartsWith(Prompt, StringComparison.Ordinal))
                text.Append(line).Append('\n').Append(Output(folder, line[Prompt.Length..]));
        }

        return text.ToString();
    }

    /// <summary>Model files that the examples use: blocks of toml, saved under the name that they give the model.</summary>
    private static void WriteModels(TemporaryFolder folder, string readme)
    {
        foreach (Match block in ModelFile().Matches(readme))
            File.WriteAllText(Path.Combine(folder.Path, block.Groups[2].Value + ".toml"), block.Groups[1].Value);
    }

    private static string Output(TemporaryFolder folder, string arguments)
    {
        ProcessOutcome outcome = CommandLineProcess.Run(folder.Path, arguments.Split(' ')).Expect(0);
        string[] lines = [.. outcome.Out.TrimEnd().Split('\n').Select(static l => l.TrimEnd())];
        return string.Join('\n', lines) + "\n";
    }

    private static string Comparable(string text)
    {
        text = Times().Replace(text, "TIME");
        text = Processor().Replace(text, "PROCESSOR");
        text = Noise().Replace(text, "NOISE");
        text = LastDigits().Replace(text, "$1");
        text = JsonMachine().Replace(text, "$1 MACHINE");
        return Spaces().Replace(text, " ");
    }

    [GeneratedRegex(@"\b\d+(\.\d+)? (ms|s|min|h)\b( \d+ (s|min))?|(?<=\s)-(?=\n)")]
    private static partial Regex Times();

    /// <summary>Numbers of round-off size, which may differ between processors and mathematical libraries.</summary>
    [GeneratedRegex(@"-?\d+(\.\d+)?[eE]-(1[3-9]|[2-9]\d)\b")]
    private static partial Regex Noise();

    /// <summary>Decimals after the twelfth, for the same reason.</summary>
    [GeneratedRegex(@"(\.\d{12})\d+")]
    private static partial Regex LastDigits();

    [GeneratedRegex(@"managed SIMD kernels, [\w-]+, \d+ thread\(s\)")]
    private static partial Regex Processor();

    [GeneratedRegex("(\"(seconds|threads|backendDescription)\":) [^\n]*")]
    private static partial Regex JsonMachine();

    [GeneratedRegex("```toml\n(name = \"([a-z0-9-]+)\"\n.*?)```", RegexOptions.Singleline)]
    private static partial Regex ModelFile();

    [GeneratedRegex(" +")]
    private static partial Regex Spaces();
}
