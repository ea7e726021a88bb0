using Spectre.Console;

namespace TensorRG.Cli.Output;

/// <summary>A last line on a terminal that is overwritten and leaves no trace; nothing elsewhere.</summary>
/// <param name="console">Where to.</param>
internal sealed class StatusLine(IAnsiConsole console) : IProgress<string>, IDisposable
{
    private readonly bool _isShown = console.Profile.Capabilities.Interactive && console.Profile.Capabilities.Ansi;

    public void Report(string value)
    {
        Clear();
        if (!_isShown)
            return;
        int room = Math.Max(1, console.Profile.Width - 1);
        console.Write(new Text(value.Length <= room ? value : value[..room], new Style(decoration: Decoration.Dim)));
    }

    public void Clear()
    {
        if (_isShown)
            console.Write(new ControlCode("\r\u001b[2K"));
    }

    public void Dispose() => Clear();
}
