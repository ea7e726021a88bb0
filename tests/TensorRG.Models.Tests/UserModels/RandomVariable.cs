using System.Globalization;

namespace TensorRG.Models.Tests.UserModels;

/// <summary>A variable of a random model: its text, and what it stands for.</summary>
/// <param name="Name">Name.</param>
/// <param name="Text">The values as the file has them.</param>
/// <param name="Values">The values.</param>
/// <param name="LogMeasure">Logarithm of the weight of each in sums.</param>
/// <param name="IsExact">True if the values are multiples of 1/2.</param>
internal sealed record RandomVariable(string Name, string Text, double[] Values, double[] LogMeasure, bool IsExact)
{
    private const string WholeName = "q";

    /// <summary>A variable of 2 or 3 values, in any form.</summary>
    /// <param name="random">Source of numbers.</param>
    /// <param name="name">Its name.</param>
    /// <param name="count">Number of values; the parameter q has this value if <paramref name="usesParameter"/>.</param>
    /// <param name="usesParameter">True if q may be used.</param>
    public static RandomVariable Draw(Random random, string name, int count, bool usesParameter)
    {
        string q = usesParameter ? WholeName : count.ToString(CultureInfo.InvariantCulture);
        double[] steps = [.. Enumerable.Range(0, count).Select(static k => (double)k)];
        double[] angles = [.. steps.Select(k => 2 * Math.PI * k / count)];
        return random.Next(count == 2 ? 7 : 6) switch
        {
            0 => Plain(name, $"\"0..{q}-1\"", steps),
            1 => Plain(name, $"\"1..{q}\"", [.. steps.Select(static k => k + 1)]),
            2 => new(name, $"{{ angles = \"{q}\" }}", angles, new double[count], false),
            3 => new(name, $"{{ circle = \"{q}\" }}", angles, [.. angles.Select(_ => Math.Log(2 * Math.PI / count))], false),
            4 => Plain(name, count == 2 ? "[1, -1]" : "[-1, 0, \"1/2\"]", count == 2 ? [1, -1] : [-1, 0, 0.5]),
            5 => Field(name, count, q),
            _ => Plain(name, "\"occupation\"", steps),
        };
    }

    private static RandomVariable Plain(string name, string text, double[] values) => new(name, text, values, new double[values.Length], true);

    // H_2 and H_3: nodes +-1/sqrt 2 with weight sqrt(pi)/2; 0 and +-sqrt(3/2) with 2 sqrt(pi)/3 and sqrt(pi)/6.
    private static RandomVariable Field(string name, int count, string q)
    {
        double root = Math.Sqrt(Math.PI), far = Math.Sqrt(1.5), near = Math.Sqrt(0.5);
        (double X, double W)[] rule = count == 2 ? [(-near, root / 2), (near, root / 2)] : [(-far, root / 6), (0, 2 * root / 3), (far, root / 6)];
        return new(name, $"{{ field = \"{q}\", width = \"1.25\" }}", [.. rule.Select(static r => 1.25 * r.X)], [.. rule.Select(static r => Math.Log(1.25 * r.W) + (r.X * r.X))], false);
    }
}
