using System.Numerics;
using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>The slots of one set of parameters. Constants are evaluated when an expression first needs them.</summary>
internal sealed class Workspace
{
    private readonly Globals globals;
    private readonly bool[] ready;

    /// <summary>A workspace with the parameters filled in.</summary>
    /// <param name="globals">Parameters and constants of the file.</param>
    /// <param name="parameters">The values.</param>
    /// <param name="more">Number of slots beyond those, for variables.</param>
    public Workspace(Globals globals, ParameterSet parameters, int more = 0)
    {
        this.globals = globals;
        ready = new bool[globals.Constants.Length];
        Slots = new Complex[globals.Count + more];
        for (int i = 0; i < globals.Parameters.Length; i++)
        {
            FileParameter p = globals.Parameters[i];
            Slots[i] = p.IsComplex
                ? new Complex(parameters[p.Definitions[0].Name], parameters[p.Definitions[1].Name])
                : parameters[p.Definitions[0].Name];
        }
    }

    /// <summary>The values.</summary>
    public Complex[] Slots { get; }

    /// <summary>The value of an expression of parameters and constants, as a complex number.</summary>
    /// <param name="expression">A number.</param>
    /// <exception cref="ModelFileException">It has no value here.</exception>
    public Complex Number(Expression expression)
    {
        Prepare(expression);
        return expression.Number(Slots);
    }

    /// <summary>The value of a real expression of parameters and constants.</summary>
    /// <param name="expression">A number.</param>
    /// <param name="what">What it is, for messages.</param>
    /// <exception cref="ModelFileException">It has no value here, or a complex one.</exception>
    public double Real(Expression expression, string what)
    {
        Prepare(expression);
        return expression.Real(Slots, what);
    }

    /// <summary>The value of a whole number in a range.</summary>
    /// <param name="expression">A number.</param>
    /// <param name="least">Least value.</param>
    /// <param name="most">Largest value.</param>
    /// <param name="what">What it is, for messages.</param>
    /// <exception cref="ModelFileException">It is none.</exception>
    public int Whole(Expression expression, int least, int most, string what)
    {
        double value = Real(expression, what);
        return value >= least && value <= most && value == Math.Floor(value)
            ? (int)value
            : throw expression.Spot.Error(0, FormattableString.Invariant($"{what} is {value}, but must be a whole number from {least} to {most}. Change it, or the parameters it depends on."));
    }

    /// <summary>The value of a condition on parameters and constants.</summary>
    /// <param name="expression">A truth value.</param>
    /// <exception cref="ModelFileException">It has no value here.</exception>
    public bool Truth(Expression expression)
    {
        Prepare(expression);
        return expression.Truth(Slots);
    }

    /// <summary>Evaluates the constants that an expression needs.</summary>
    /// <param name="expression">The expression.</param>
    /// <exception cref="ModelFileException">A constant has no value here.</exception>
    public void Prepare(Expression expression)
    {
        int first = globals.Parameters.Length;
        foreach (int slot in expression.Slots)
        {
            if (slot < first || slot >= globals.Count || ready[slot - first])
                continue;
            Slots[slot] = Number(globals.Constants[slot - first].Value);
            ready[slot - first] = true;
        }
    }
}
