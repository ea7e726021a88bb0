using TensorRG.Models.Files.Expressions;

namespace TensorRG.Models.Files;

/// <summary>An exact or best published value that the file gives.</summary>
/// <param name="Quantity">Name of the quantity.</param>
/// <param name="Value">The value.</param>
/// <param name="Uncertainty">Its absolute uncertainty, or null for that of the evaluation.</param>
/// <param name="When">Where it holds, or null for everywhere.</param>
/// <param name="Source">Who published it, and where.</param>
internal sealed record FileReference(string Quantity, Expression Value, double? Uncertainty, Expression? When, string Source)
{
    /// <summary>Where it holds, in words.</summary>
    public string Validity => When?.Text ?? "all parameters";

    /// <summary>The value, or null where it does not hold.</summary>
    /// <param name="work">The parameters.</param>
    /// <exception cref="ModelFileException">It has no value here, or a complex one.</exception>
    public ExactValue? At(Workspace work)
    {
        if (When is not null && !work.Truth(When))
            return null;
        double value = work.Real(Value, "A reference value");
        return new(value, Uncertainty ?? (8 * Constants.Epsilon * Math.Abs(value)), Source, $"{Value.Text}, as the model file gives it");
    }
}
