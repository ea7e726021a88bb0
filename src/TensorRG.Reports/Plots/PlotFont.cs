using System.Collections.Immutable;
using SkiaSharp;

namespace TensorRG.Reports;

/// <summary>
/// The font of all figures: DejaVu Sans where installed, else the next of a few common ones, else whatever the machine
/// has. Text needs it twice: to be drawn, and to be measured for the layout.
/// </summary>
internal sealed class PlotFont
{
    private const string NoFont =
        "No font was found on this machine: the figures carry no text. Install one, such as DejaVu Sans (Debian package fonts-dejavu-core).";

    private static readonly string[] s_wanted = ["DejaVu Sans", "Noto Sans", "Liberation Sans", "Verdana", "Segoe UI", "Arial", "Helvetica"];
    private static readonly Lazy<PlotFont> s_default = new(() => new PlotFont(Choose(SKFontManager.Default)));

    public PlotFont(SKTypeface typeface)
        : this(typeface, typeface.ContainsGlyphs)
    {
    }

    internal PlotFont(SKTypeface typeface, Func<string, bool> containsGlyphs)
    {
        Typeface = typeface;
        Family = typeface.FamilyName;
        HasSpecialCharacters = containsGlyphs(TickLabel.SpecialCharacters);
        Notices = containsGlyphs("A0") ? [] : [NoFont];
    }

    public static PlotFont Default => s_default.Value;

    public string Family { get; }

    public SKTypeface Typeface { get; }

    /// <summary>Whether tick labels may use superscript digits.</summary>
    public bool HasSpecialCharacters { get; }

    /// <summary>A notice where the font has no letters: on a machine without fonts, text silently vanishes.</summary>
    public ImmutableArray<string> Notices { get; }

    /// <summary>The font at a size, with unrounded advances: what is measured at one size holds at another.</summary>
    public SKFont At(float size) => new(Typeface, size) { Subpixel = true, LinearMetrics = true, Hinting = SKFontHinting.None };

    public float Width(string text, float size)
    {
        using var font = At(size);
        return font.MeasureText(text);
    }

    /// <summary>Breaks a text between words into lines no wider than given; a longer word stands alone.</summary>
    public ImmutableArray<string> Wrap(string text, float size, float width)
    {
        var lines = new List<string>();
        foreach (var word in text.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            if (lines.Count > 0 && Width(lines[^1] + " " + word, size) <= width) lines[^1] += " " + word;
            else lines.Add(word);
        }
        return [.. lines];
    }

    private static SKTypeface Choose(SKFontManager fonts)
    {
        var installed = fonts.GetFontFamilies();
        var family = s_wanted.FirstOrDefault(f => installed.Contains(f, StringComparer.OrdinalIgnoreCase));
        return family is null ? SKTypeface.Default : fonts.MatchFamily(family);
    }
}
