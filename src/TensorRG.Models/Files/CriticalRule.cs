using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>The exact critical temperature that the file gives.</summary>
/// <param name="Temperature">The temperature; it does not depend on T.</param>
/// <param name="When">Where it holds, or null for everywhere.</param>
/// <param name="Source">Who published it, and where.</param>
internal sealed record CriticalRule(Expression Temperature, Expression? When, string Source)
{
    /// <summary>The critical temperature, or why there is none.</summary>
    /// <param name="work">The parameters.</param>
    /// <exception cref="ModelFileException">It has no value here, or a complex one.</exception>
    public CriticalPoint At(Workspace work)
    {
        if (When is not null && !work.Truth(When))
            return CriticalPoint.None($"the model file knows it only where {When.Text}");
        double value = work.Real(Temperature, "The critical temperature");
        return value > 0
            ? CriticalPoint.At(new(value, 8 * Constants.Epsilon * value, Source, $"{Temperature.Text}, as the model file gives it"))
            : CriticalPoint.None(FormattableString.Invariant($"the formula of the model file gives {value}"));
    }
}
