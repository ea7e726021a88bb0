using System.Collections.Immutable;

namespace TensorRG.Reports;

/// <summary>
/// Tick positions and labels for a linear or logarithmic axis: round numbers 1, 2, 5 or decades with their 2 to 9.
/// Pure functions of the range, so the same data give the same ticks on every machine.
/// </summary>
public static class Ticks
{
    private const int MostDecadeLabels = 9;
    private const int MostMinorDecades = 16;
    private const double ShortestInDecades = 0.6;

    /// <summary>Decade ticks for a logarithmic axis, with minor ticks; where no two decades fit in, 2 and 5 are labelled too, and on less than 0.6 of a decade round values.</summary>
    /// <param name="range">Range in decimal logarithms.</param>
    /// <param name="superscripts">Whether 10⁻⁸ may be written with superscript digits; 1e-08 otherwise.</param>
    public static ImmutableArray<AxisTick> Logarithmic(AxisRange range, bool superscripts = true)
    {
        if (range.Length < ShortestInDecades) return WithinADecade(range, superscripts);
        var first = (int)Math.Floor(range.Low);
        var last = (int)Math.Ceiling(range.High);
        var inside = Enumerable.Range(first, last - first + 1).Count(d => range.Contains(d));
        var every = Math.Max(1, (int)Math.Ceiling(inside / (double)MostDecadeLabels));
        var ticks = new List<AxisTick>();
        for (var decade = first; decade <= last; decade++)
        {
            var labelled = Modulo(decade, every) == 0;
            ticks.Add(new AxisTick(decade, labelled ? TickLabel.Decade(decade, superscripts) : "", labelled));
            if (inside <= MostMinorDecades) ticks.AddRange(Minor(decade, labelFew: inside < 2, superscripts));
        }
        return [.. ticks.Where(t => range.Contains(t.Position)).OrderBy(t => t.Position)];
    }

    /// <summary>Ticks at multiples of 1, 2 or 5 times a power of ten.</summary>
    /// <param name="range">Range in values.</param>
    /// <param name="count">Number of intervals aimed at.</param>
    /// <param name="powerOfTen">Common power of ten taken out of the labels, 0 for none: see <see cref="CommonPower"/>.</param>
    public static ImmutableArray<AxisTick> Linear(AxisRange range, int count = 7, int powerOfTen = 0)
    {
        var step = RoundStep(range.Length / count);
        var decimals = Math.Max(0, -(int)Math.Floor(Math.Log10(step) + 1e-9) + powerOfTen);
        var ticks = ImmutableArray.CreateBuilder<AxisTick>();
        for (var i = Math.Ceiling(range.Low / step - 1e-9); i * step <= range.High + 1e-9 * step; i++)
            ticks.Add(new AxisTick(i * step, TickLabel.Fixed(i * step, powerOfTen, decimals), true));
        return ticks.DrainToImmutable();
    }

    /// <summary>Ticks at whole numbers only, for steps of a flow.</summary>
    /// <param name="range">Range in values.</param>
    /// <param name="count">Number of intervals aimed at.</param>
    public static ImmutableArray<AxisTick> Whole(AxisRange range, int count = 10) =>
        RoundStep(range.Length / count) >= 1 ? Linear(range, count) : Linear(range, Math.Max(1, (int)range.Length));

    /// <summary>Ticks at given values, such as the bond dimensions of a scan; a label closer than <paramref name="spacing"/> of the axis to the one before is dropped, the tick stays.</summary>
    /// <param name="values">Positive on a logarithmic axis; others are ignored.</param>
    /// <param name="scale">Scale of the axis.</param>
    /// <param name="range">Range in axis coordinates.</param>
    /// <param name="spacing">Least distance of two labels, as a fraction of the axis.</param>
    public static ImmutableArray<AxisTick> At(IEnumerable<double> values, AxisScale scale, AxisRange range, double spacing = 0.04)
    {
        var ticks = ImmutableArray.CreateBuilder<AxisTick>();
        var lastLabel = double.NegativeInfinity;
        foreach (var value in values.Distinct().Order())
        {
            var position = PlotScale.Position(value, scale);
            if (!double.IsFinite(position) || !range.Contains(position)) continue;
            var fits = position - lastLabel >= spacing * range.Length;
            ticks.Add(new AxisTick(position, fits ? NumberFormat.RoundTrip(value) : "", true));
            if (fits) lastLabel = position;
        }
        return ticks.DrainToImmutable();
    }

    /// <summary>The power of ten worth taking out of the labels of a linear axis: 0 where plain decimals read well.</summary>
    /// <param name="range">Range in values.</param>
    public static int CommonPower(AxisRange range)
    {
        var largest = Math.Max(Math.Abs(range.Low), Math.Abs(range.High));
        return largest is >= 1e-3 and < 1e6 ? 0 : (int)Math.Floor(Math.Log10(largest));
    }

    private static ImmutableArray<AxisTick> WithinADecade(AxisRange range, bool superscripts)
    {
        var values = new AxisRange(Math.Pow(10, range.Low), Math.Pow(10, range.High));
        var power = (int)Math.Floor(range.Low);
        var isPlain = power is >= -3 and < 5;
        var linear = Linear(values, 4, isPlain ? 0 : power).Where(t => t.Position > 0);
        return [.. linear.Select(t => new AxisTick(Math.Log10(t.Position), isPlain ? t.Label : TickLabel.Times(t.Label, power, superscripts), true))];
    }

    private static IEnumerable<AxisTick> Minor(int decade, bool labelFew, bool superscripts)
    {
        for (var digit = 2; digit <= 9; digit++)
        {
            var label = labelFew && (digit is 2 or 5) ? TickLabel.Multiple(digit, decade, superscripts) : "";
            yield return new AxisTick(decade + Math.Log10(digit), label, label.Length > 0);
        }
    }

    private static double RoundStep(double rough)
    {
        var power = Math.Pow(10, Math.Floor(Math.Log10(rough)));
        var mantissa = rough / power;
        return power * (mantissa < 1.5 ? 1 : mantissa < 3.5 ? 2 : mantissa < 7.5 ? 5 : 10);
    }

    private static int Modulo(int value, int divisor) => ((value % divisor) + divisor) % divisor;
}
