using System.Text;
using TensorRG.Models.Files;

namespace TensorRG.Models.Tests.Files;

/// <summary>Random damage to valid files: the answer is a model or a <see cref="ModelFileException"/>, never anything else.</summary>
public class FuzzTests
{
    private const string Alphabet = "\"'[]{}()=.,#\n\t _-+*/^0123456789eijTsx<>\\\0\u0001é\uD800";

    private static readonly string[] Pieces =
    [
        "0", "-1", "1e308", "1e999", "nan", "inf", "i", "1/0", "s_i", "q", "\"\"\"", "'''", "[[", "]]", "{", "}", "[site]", "[parameters]", "[vertex]", "true", "complex = true", "whole = true",
        "if(", "near(", "^", "==", "..", "0..300", "\\u0000", "\r\n", "name = \"x\"", "{ field = 99 }", "{ circle = 200 }", "1979-05-27T07:32:00Z", "\uFEFF", "ln(0)", "and", "not ",
    ];

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Damaged_files_yield_a_model_or_a_message(int seed)
    {
        Random random = new(seed);
        int refused = 0;
        for (int n = 0; n < 800; n++)
        {
            string text = Samples.All[random.Next(Samples.All.Count)];
            for (int times = random.Next(1, 4); times > 0; times--)
                text = Damage(random, text);
            refused += Outcome(text, $"seed {seed}, file {n}") ? 0 : 1;
        }
        Assert.InRange(refused, 100, 799);
    }

    [Fact]
    public void Damaged_bytes_on_disk_yield_a_model_or_a_message()
    {
        Random random = new(5);
        string path = Path.Combine(Path.GetTempPath(), $"tensorrg-fuzz-{Guid.NewGuid():N}.toml");
        try
        {
            for (int n = 0; n < 300; n++)
            {
                byte[] bytes = Encoding.UTF8.GetBytes(Samples.All[random.Next(Samples.All.Count)]);
                for (int times = random.Next(1, 6); times > 0; times--)
                    bytes[random.Next(bytes.Length)] = (byte)random.Next(256);
                File.WriteAllBytes(path, bytes);
                Outcome(() => ModelFile.Load(path), $"seed 5, file {n}");
            }
        }
        finally
        {
            File.Delete(path);
        }
    }

    private static bool Outcome(string text, string what) => Outcome(() => Samples.Parse(text), $"{what}:\n{text}");

    private static bool Outcome(Func<FileModel> load, string what)
    {
        try
        {
            FileModel model = load();
            Assert.NotNull(model.System(model.CreateParameters()));
            return true;
        }
        catch (ModelFileException e)
        {
            Assert.DoesNotContain('\n', e.Message);
            return false;
        }
        catch (Exception e) when (e is not Xunit.Sdk.XunitException)
        {
            throw new InvalidOperationException($"{e.GetType().Name} {e.Message} for {what}", e);
        }
    }

    private static string Damage(Random random, string text)
    {
        if (text.Length == 0)
            return Pieces[random.Next(Pieces.Length)];
        int at = random.Next(text.Length), length = Math.Min(random.Next(1, 12), text.Length - at);
        string[] lines = text.Split('\n');
        int line = random.Next(lines.Length);
        return random.Next(9) switch
        {
            0 => text.Insert(at, Alphabet[random.Next(Alphabet.Length)].ToString()),
            1 => text.Remove(at, length),
            2 => text.Remove(at, 1).Insert(at, Alphabet[random.Next(Alphabet.Length)].ToString()),
            3 => text.Insert(at, Pieces[random.Next(Pieces.Length)]),
            4 => text[..at],
            5 => string.Join('\n', lines.Append(lines[line])),
            6 => string.Join('\n', [.. lines[..line], lines[line], .. lines[line..]]),
            7 => string.Join('\n', [.. lines[..line], .. lines[(line + 1)..]]),
            _ => text.Remove(at, length).Insert(random.Next(text.Length - length + 1), text.Substring(at, length)),
        };
    }
}
