namespace TensorRG.Models.Tests.Files;

/// <summary>A line of data/malformed-models.tsv.</summary>
public sealed record MalformedCase(string Text, int Line, int Column, string Fragment)
{
    private const char Mark = '§';

    public static IReadOnlyList<MalformedCase> All { get; } =
    [
        .. File.ReadLines(Path.Combine(AppContext.BaseDirectory, "data", "malformed-models.tsv"))
            .Where(line => line.Length > 0 && line[0] != '#')
            .Select(Read),
    ];

    private static MalformedCase Read(string line)
    {
        string[] fields = line.Split('\t');
        (string old, string replacement) = (Plain(fields[1]), Plain(fields[2]));
        string sample = Sample(fields[0]);
        Assert.True(sample.Contains(old, StringComparison.Ordinal), $"'{old}' is not in the sample {fields[0]}: {line}");
        int at = sample.IndexOf(old, StringComparison.Ordinal);
        string text = sample[..at] + replacement + sample[(at + old.Length)..];
        int mark = text.IndexOf(Mark, StringComparison.Ordinal);
        if (mark < 0)
            return new(text, 0, 0, fields[3]);
        string before = text[..mark];
        return new(before + text[(mark + 1)..], 1 + before.Count(c => c == '\n'), mark - before.LastIndexOf('\n'), fields[3]);
    }

    private static string Sample(string name) => name switch
    {
        "ising" => Samples.Ising,
        "hard-squares" => Samples.HardSquares,
        "faces" => Samples.Faces,
        "six" => Samples.Vertices,
        "loops" => Samples.HoneycombVertices,
        "rotors" => Samples.Rotors,
        "field" => Samples.Field,
        "empty" => "",
        _ => throw new ArgumentException($"There is no sample '{name}'.", nameof(name)),
    };

    private static string Plain(string field)
    {
        System.Text.StringBuilder text = new();
        for (int i = 0; i < field.Length; i++)
        {
            char c = field[i];
            text.Append(c != '\\' ? c : field[++i] switch { 'n' => '\n', 't' => '\t', '\\' => '\\', char digit => (char)(digit - '0') });
        }
        return text.ToString();
    }
}
