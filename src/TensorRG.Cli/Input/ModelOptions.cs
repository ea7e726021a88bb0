using System.CommandLine;

namespace TensorRG.Cli.Input;

/// <summary>The argument and the options that say of which model; shared by all commands that compute.</summary>
internal sealed class ModelOptions
{
    public Argument<string> Model { get; } = TextInput.Required("model", ModelSource.Help);

    public Option<string> Temperature { get; } = new("--temperature", "-T")
    {
        Description = "Temperature (k_B = 1, in units of the coupling), or 'critical' where that is known exactly. Default: critical.",
        HelpName = "T|critical",
    };

    public Option<string[]> Set { get; } = new("--set", "-s")
    {
        Description = "Value of a model parameter, complex where the model allows it; repeat for more.",
        HelpName = "NAME=VALUE",
    };

    public ParameterRequest Read(ParseResult result) => Read(result, result.GetRequiredValue(Model));

    /// <summary>Reads the options for a model that is named elsewhere.</summary>
    public ParameterRequest Read(ParseResult result, string model)
        => ParameterRequest.Create(ModelSource.Find(model), result.GetValue(Temperature), result.GetValue(Set) ?? []);
}
