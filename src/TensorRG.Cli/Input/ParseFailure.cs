using System.CommandLine;
using System.CommandLine.Parsing;
using TensorRG.Models;

namespace TensorRG.Cli.Input;

/// <summary>Says what is wrong with a command line that could not be parsed, and where to read on.</summary>
internal static class ParseFailure
{
    /// <summary>The message: the first word that has no meaning if there is one, else everything the options object to.</summary>
    public static string Describe(ParseResult result)
    {
        Command command = result.CommandResult.Command;
        bool isRoot = command is RootCommand;
        string path = isRoot ? "tensorrg" : "tensorrg " + command.Name;
        return $"{What(result, command, isRoot, path)}\nSee: {path} --help";
    }

    private static string What(ParseResult result, Command command, bool isRoot, string path)
    {
        if (MisreadOption(result) is { } option)
            return UnknownOption(option, command, path);
        if (result.UnmatchedTokens.Count > 0)
            return Unmatched(result.UnmatchedTokens[0], command, isRoot, path);
        return isRoot
            ? $"A command is missing. There are: {string.Join(", ", Names(command))}."
            : string.Join('\n', result.Errors.Select(static e => e.Message).Distinct());
    }

    /// <summary>A misspelt option in front of an argument is taken for it by the parser.</summary>
    private static string? MisreadOption(ParseResult result) => result.CommandResult.Children
        .OfType<ArgumentResult>()
        .SelectMany(static a => a.Tokens)
        .Select(static t => t.Value)
        .FirstOrDefault(static v => v.StartsWith('-'));

    private static string Unmatched(string token, Command command, bool isRoot, string path)
    {
        if (token.Length > 1 && token[0] == '-')
            return UnknownOption(token, command, path);
        return isRoot
            ? $"There is no command '{token}'.{NameSuggestion.Text(token, Names(command))} There are: {string.Join(", ", Names(command))}."
            : $"'{token}' has no meaning here: '{path}' takes {Arguments(command)}, and each option one value. Leave it out, or put what has spaces in quotes.";
    }

    private static string UnknownOption(string token, Command command, string path)
    {
        string name = token.Split('=', 2)[0];
        IEnumerable<string> known = command.Options.Where(static o => !o.Hidden).Select(static o => o.Name);
        return $"'{path}' has no option '{name}'.{NameSuggestion.Text(name, known)}";
    }

    private static string Arguments(Command command)
        => command.Arguments.Count == 0 ? "options only" : string.Join(", ", command.Arguments.Select(static a => $"one {a.Name}"));

    private static IEnumerable<string> Names(Command command) => command.Subcommands.Select(static c => c.Name);
}
