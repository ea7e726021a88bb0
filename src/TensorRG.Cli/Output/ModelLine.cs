using System.Globalization;
using TensorRG.Models;

namespace TensorRG.Cli.Output;

/// <summary>A model and its parameters in one line.</summary>
internal static class ModelLine
{
    public static string Of(ParameterSet parameters)
        => parameters.Model.Title + ": " + Parameters(parameters);

    public static string Parameters(ParameterSet parameters)
        => string.Join(", ", parameters.Model.Parameters.Zip(parameters.Values, static (definition, value) =>
            definition.Symbol + " = " + value.Value.ToString(CultureInfo.InvariantCulture)));
}
