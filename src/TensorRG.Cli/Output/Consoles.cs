using Spectre.Console;

namespace TensorRG.Cli.Output;

/// <summary>The two consoles of the process. Output that is no terminal is laid out for 120 columns.</summary>
internal static class Consoles
{
    private const int PipeWidth = 120;

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
