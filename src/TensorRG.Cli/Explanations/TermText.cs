using System.Globalization;
using TensorRG.Cli.Output;

namespace TensorRG.Cli.Explanations;

/// <summary>Tables of energies and weights as text: in full where they are small, else what they range over.</summary>
internal static class TermText
{
    private const int MostStatesOfPair = 6;
    private const int MostListed = 16;
    private const int Left = 8;
    private const int Gap = 2;

    /// <summary>Writes one table.</summary>
    /// <param name="page">Where to.</param>
    /// <param name="term">The table.</param>
    /// <param name="labels">The states.</param>
    public static void Write(Page page, TermView term, IReadOnlyList<string> labels)
    {
        string heading = $"{Symbol(term)}, {term.Where}";
        if (term.IsIdle)
            page.Item($"{heading}: {(term.Kind == TermKind.Energy ? "0" : "1")} for all states");
        else if (term.Variables.Length == 1 && labels.Count <= MostListed)
            page.Item($"{heading}: {string.Join(", ", labels.Select((l, s) => $"{Name(term)}({l}) = {ComplexText.Of(term.Values[s])}"))}");
        else if (term.Variables.Length == 2 && labels.Count <= MostStatesOfPair)
            Pairs(page, term, labels, heading);
        else if (term.Variables.Length > 2 && term.Values.Length - term.Excluded <= MostListed)
            Configurations(page, term, labels, heading);
        else
            page.Item($"{heading}: {Summary(term)}");
    }

    /// <summary>What the values range over.</summary>
    public static string Summary(TermView term)
    {
        (double least, double most) = term.Range;
        string what = term.IsReal ? "values" : "complex values of magnitude";
        return FormattableString.Invariant($"{term.Values.Length} configurations, {term.Distinct} distinct {what} from {ComplexText.Of(least)} to {ComplexText.Of(most)}, {term.Excluded} excluded");
    }

    private static string Symbol(TermView term)
        => $"{Name(term)}({string.Join(", ", term.Variables)}){(term.Kind == TermKind.Factor ? " beside exp(-E/T)" : "")}";

    private static string Name(TermView term) => term.Kind switch
    {
        TermKind.Energy => "E",
        TermKind.Weight => "weight",
        _ => "factor",
    };

    // Rows are states of i, columns of j.
    private static void Pairs(Page page, TermView term, IReadOnlyList<string> labels, string heading)
    {
        int q = labels.Count;
        string[][] cells = [.. Enumerable.Range(0, q).Select(i => Enumerable.Range(0, q).Select(j => ComplexText.Of(term.Values[(i * q) + j])).ToArray())];
        int longest = labels.Max(static l => l.Length);
        bool isNumbered = (q + 1) * (longest + Gap) > Page.Width - Left;
        if (isNumbered)
            labels = [.. Enumerable.Range(1, q).Select(static n => n.ToString(CultureInfo.InvariantCulture))];
        int first = labels.Max(static l => l.Length);
        int[] widths = [.. Enumerable.Range(0, q).Select(j => Gap + Math.Max(labels[j].Length, cells.Max(r => r[j].Length)))];
        page.Item($"{heading}{(isNumbered ? "; states numbered in the order above" : "")}:");
        page.Line(new string(' ', Left + first - Gap) + "j = " + string.Concat(labels.Select((l, j) => l.PadLeft(widths[j]))));
        for (int i = 0; i < q; i++)
            page.Line((i == 0 ? "i = " : "").PadLeft(Left) + labels[i].PadLeft(first) + new string(' ', Gap) + string.Concat(cells[i].Select((c, j) => c.PadLeft(widths[j]))));
    }

    private static void Configurations(Page page, TermView term, IReadOnlyList<string> labels, string heading)
    {
        int n = term.Variables.Length, q = labels.Count;
        page.Item($"{heading}{(term.Excluded > 0 ? FormattableString.Invariant($"; the {term.Excluded} other configurations are excluded") : "")}:");
        IEnumerable<string[]> rows = Enumerable.Range(0, term.Values.Length)
            .Where(k => term.Values[k] is not null)
            .Select(k => (string[])["", .. Enumerable.Range(0, n).Select(place => labels[k / (int)Math.Pow(q, n - 1 - place) % q]), ComplexText.Of(term.Values[k])]);
        page.Table(["", .. term.Variables, term.Kind == TermKind.Energy ? "E" : "weight"], rows);
    }
}
