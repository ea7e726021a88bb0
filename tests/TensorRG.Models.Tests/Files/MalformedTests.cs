using System.Text;
using System.Text.RegularExpressions;
using TensorRG.Models.Files;

namespace TensorRG.Models.Tests.Files;

/// <summary>Files that are not right are refused with place, reason and remedy, and nothing but <see cref="ModelFileException"/>.</summary>
public partial class MalformedTests
{
    [Fact]
    public void The_corpus_is_refused_at_the_right_place_with_a_remedy()
    {
        Assert.True(MalformedCase.All.Count >= 150);
        string[] wrong = [.. MalformedCase.All.Select(Complaint).OfType<string>()];
        Assert.True(wrong.Length == 0, string.Join("\n", wrong));
    }

    [Theory]
    [InlineData("(", 9990, "nested more than 200")]
    [InlineData("(", 9000, "nested more than 200")]
    [InlineData("-", 5000, "nested more than 200")]
    [InlineData("+", 5000, "nested more than 200")]
    [InlineData("not ", 2000, "nested more than 200")]
    [InlineData("sin(", 2000, "nested more than 200")]
    [InlineData("if(", 2000, "nested more than 200")]
    [InlineData("2^", 3000, "nested more than 200")]
    [InlineData("1+", 3000, "more than 1000 operations")]
    [InlineData("1*", 3000, "more than 1000 operations")]
    [InlineData("1==1 or ", 1200, "more than 1000 operations")]
    [InlineData("1 ", 20000, "more than 10000 characters")]
    public void Deep_and_long_expressions_are_refused(string piece, int count, string fragment)
    {
        ModelFileException e = Refused(Samples.HardSquares.Replace("\"z^n\"", $"\"{string.Concat(Enumerable.Repeat(piece, count))}1\"", StringComparison.Ordinal));
        Assert.Contains(fragment, e.Message, StringComparison.Ordinal);
        Assert.Equal(8, e.Line);
    }

    [Theory]
    [InlineData("a = ", "[")]
    [InlineData("a = ", "{a=")]
    [InlineData("", "a.")]
    [InlineData("[", "a.")]
    [InlineData("", "[")]
    [InlineData("a = [", "1,")]
    [InlineData("", "a=1\n")]
    [InlineData("", "[[a]]\n")]
    public void Much_repetition_is_answered(string start, string piece)
        => Refused(start + string.Concat(Enumerable.Repeat(piece, 300_000 / piece.Length)));

    [Fact]
    public void A_megabyte_of_keys_is_answered()
    {
        StringBuilder text = new(Samples.Ising + "\n[x]\n");
        for (int i = 0; text.Length < 1_000_000; i++)
            text.Append(System.Globalization.CultureInfo.InvariantCulture, $"k{i}={i}\n");
        Assert.Contains("There is no key 'x' in the top level", Refused(text.ToString()).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("[constants]")]
    [InlineData("[parameters]")]
    [InlineData("[site]")]
    [InlineData("[observables]")]
    public void Too_many_entries_are_refused(string header)
    {
        string many = string.Concat(Enumerable.Range(0, 250).Select(i => $"k{i} = {(header == "[site]" ? "[0]" : "1")}\n"));
        Assert.Contains($"more than 200 entries in {header}", Refused(Samples.Ising.Replace(header + "\n", header + "\n" + many, StringComparison.Ordinal)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Too_large_a_text_is_refused()
        => Assert.Contains("larger than 1 MB", Refused(new string('#', (1 << 20) + 1)).Message, StringComparison.Ordinal);

    [Fact]
    public void Places_on_disk_that_hold_no_model_file_are_refused()
    {
        string folder = Directory.CreateTempSubdirectory("tensorrg-").FullName;
        try
        {
            Refuses(folder, "This is a folder");
            Refuses(Path.Combine(folder, "missing.toml"), "no such file");
            Refuses(Path.Combine(folder, "no", "such", "folder.toml"), "no such file");
            Refuses("", "no path");
            Refuses("a\0b", "no path");
            Refuses(Write("utf16.toml", [0xFF, 0xFE, .. Encoding.Unicode.GetBytes("name")]), "UTF-16");
            Refuses(Write("utf16be.toml", [0xFE, 0xFF, .. Encoding.BigEndianUnicode.GetBytes("name")]), "UTF-16");
            Refuses(Write("plain16.toml", Encoding.Unicode.GetBytes("name = 1")), ":1:2: A NUL character");
            Refuses(Write("latin.toml", Encoding.Latin1.GetBytes("# Gr\u00fc\u00dfe\n")), ":1:5: The byte 0xFC");
            Refuses(Write("latin2.toml", [.. "name = \"x\"\n"u8, .. Encoding.Latin1.GetBytes("# \u00e9")]), ":2:3: The byte 0xE9");
            Refuses(Write("cut.toml", [.. "# "u8, 0xE2, 0x82]), ":1:3: The byte 0xE2");
            Refuses(Write("large.toml", new byte[(1 << 20) + 1]), "larger than 1 MB");
            Refuses(Write("empty.toml", []), "is empty");
            Refuses(Write("bom.toml", [0xEF, 0xBB, 0xBF]), "is empty");
            Refuses(Write("binary.toml", [0x7F, 0x45, 0x4C, 0x46, 2, 1, 1, 0, 0]), "");
            if (File.Exists("/dev/zero"))
                Refuses("/dev/zero", "larger than 1 MB");
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }

        string Write(string name, byte[] bytes)
        {
            string path = Path.Combine(folder, name);
            File.WriteAllBytes(path, bytes);
            return path;
        }
    }

    [Fact]
    public void Messages_quote_no_control_characters_and_no_long_texts()
    {
        string message = Refused(Samples.Ising.Replace("\"square\"", "\"\\u001b[31m" + new string('x', 5000) + "\"", StringComparison.Ordinal)).Message;
        Assert.DoesNotContain(message, char.IsControl);
        Assert.InRange(message.Length, 1, 300);
    }

    [Fact]
    public void Failures_at_other_parameters_are_placed_too()
    {
        FileModel model = Samples.Parse(Samples.HardSquares);
        ModelFileException zero = Assert.Throws<ModelFileException>(() =>
        {
            FileModel none = Samples.Parse(Samples.HardSquares.Replace("z^n", "z*(1 - n)", StringComparison.Ordinal).Replace("n_i*n_j == 0", "n_i == 1 or n_j == 1", StringComparison.Ordinal));
            none.System(none.CreateParameters([new("z", 0)]));
        });
        Assert.Contains("all weights are zero", zero.Message, StringComparison.Ordinal);
        Assert.Equal(double.NegativeInfinity, model.System(model.CreateParameters([new("z", 0)]))!.LogWeights[0].Values[1].Real);
    }

    private static string? Complaint(MalformedCase given)
    {
        string head = $"{given.Text.Length} characters, expected {given.Line}:{given.Column} {given.Fragment}: ";
        try
        {
            Samples.Parse(given.Text);
            return head + "accepted";
        }
        catch (ModelFileException e)
        {
            bool placed = given.Line == 0 || (e.Line == given.Line && e.Column == given.Column);
            bool told = e.Message.Contains(given.Fragment, StringComparison.Ordinal) && Remedy().IsMatch(e.Message) && e.File == "test.toml";
            return placed && told ? null : head + e.Message;
        }
    }

    private static ModelFileException Refused(string text)
    {
        ModelFileException e = Assert.Throws<ModelFileException>(() => Samples.Parse(text));
        Assert.Matches(Remedy(), e.Message);
        return e;
    }

    private static void Refuses(string path, string fragment)
    {
        ModelFileException e = Assert.Throws<ModelFileException>(() => ModelFile.Load(path));
        Assert.StartsWith(path, e.Message, StringComparison.Ordinal);
        Assert.Contains(fragment, e.Message, StringComparison.Ordinal);
        Assert.Matches(Remedy(), e.Message);
    }

    // Place, what is wrong, and at least one more sentence: the remedy.
    [GeneratedRegex(@"^[^\n]*?(:\d+:\d+)?: [^\n]+[.?] ['A-Z][^\n]+\.$")]
    private static partial Regex Remedy();
}
