using System.CommandLine;
using System.CommandLine.Parsing;

namespace TensorRG.Cli.Input;

/// <summary>Options that take one of a few words.</summary>
internal static class ChoiceOption
{
    public static Option<string> OneOf(string name, string description, string fallback, params string[] values)
        => new(name)
        {
            Description = description,
            DefaultValueFactory = _ => fallback,
            HelpName = string.Join('|', values),
            CustomParser = result => Choose(result, name, values),
        };

    private static string Choose(ArgumentResult result, string name, string[] values)
    {
        string text = result.Tokens[0].Value;
        if (!values.Contains(text))
            result.AddError($"{name} takes one of {string.Join(", ", values)}; not '{text}'.");
        return text;
    }
}
