using Spectre.Console;

namespace TensorRG.Cli.Output;

/// <summary>The two consoles of the process. Wide lines are not wrapped when the output is no terminal.</summary>
internal static class Consoles
{
    private const int PipeWidth = 400;

    public static IAnsiConsole Out { get; } = Create(Console.Out, Console.IsOutputRedirected);

    public static IAnsiConsole Error { get; } = Create(Console.Error, Console.IsErrorRedirected);

    private static IAnsiConsole Create(TextWriter writer, bool redirected)
    {
        IAnsiConsole console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Out = new AnsiConsoleOutput(writer),
            Interactive = redirected ? InteractionSupport.No : InteractionSupport.Detect,
        });
        if (redirected)
            console.Profile.Width = PipeWidth;
        return console;
    }
}
