using System.Numerics;

namespace TensorRG.Models.Files.Expressions;

/// <summary>A function of the expression language.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Minimum">Least number of arguments.</param>
/// <param name="Maximum">Largest number of arguments.</param>
/// <param name="RealOnly">True if its arguments must be real.</param>
internal sealed record Function(string Name, int Minimum, int Maximum, bool RealOnly)
{
    /// <summary>The value for one argument.</summary>
    public Func<Complex, Complex>? One { get; init; }

    /// <summary>The value for two arguments; applied from the left where there are more.</summary>
    public Func<Complex, Complex, Complex>? Two { get; init; }

    /// <summary>The number of arguments in words.</summary>
    public string ArityText => (Minimum, Maximum) switch
    {
        (1, 1) => "one argument",
        (2, 2) => "two arguments",
        _ => $"{Minimum} or more arguments",
    };
}
