using System.CommandLine;
using System.CommandLine.Parsing;

namespace TensorRG.Cli.Input;

/// <summary>Arguments and options that take a name or a folder, never an empty text.</summary>
internal static class TextInput
{
    /// <summary>An argument that must be given.</summary>
    public static Argument<string> Required(string name, string description)
        => Checked(new Argument<string>(name) { Description = description });

    /// <summary>An argument that may be left out.</summary>
    public static Argument<string?> Optional(string name, string description)
        => Checked(new Argument<string?>(name) { Description = description, Arity = ArgumentArity.ZeroOrOne });

    /// <summary>An option that names a folder.</summary>
    public static Option<string> Folder(string name, string description)
    {
        var option = new Option<string>(name) { Description = description, HelpName = "DIR" };
        option.Validators.Add(result => RefuseEmpty(result, name));
        return option;
    }

    private static Argument<T> Checked<T>(Argument<T> argument)
    {
        argument.Validators.Add(result =>
        {
            RefuseEmpty(result, argument.Name);
            RefuseOption(result);
        });
        return argument;
    }

    private static void RefuseEmpty(SymbolResult result, string name)
    {
        if (result.Tokens.Any(static t => string.IsNullOrWhiteSpace(t.Value)))
            result.AddError($"{name} is empty. Give a name, or leave it out for the default where there is one.");
    }

    /// <summary>A misspelt option in front of the argument would otherwise be taken for it.</summary>
    private static void RefuseOption(ArgumentResult result)
    {
        if (result.Tokens.Any(static t => t.Value.StartsWith('-')))
            result.AddError($"{result.Argument.Name} must not begin with '-'.");
    }
}
