using System.Text.Json.Nodes;

namespace TensorRG.EndToEnd.Harness;

/// <summary>How a process ended and what it printed.</summary>
/// <param name="Command">The command line, for messages.</param>
/// <param name="ExitCode">Exit code; 128 plus the signal where one ended it.</param>
/// <param name="Out">Standard output.</param>
/// <param name="Error">Standard error.</param>
internal sealed record ProcessOutcome(string Command, int ExitCode, string Out, string Error)
{
    public JsonObject Json => JsonNode.Parse(Out)!.AsObject();

    /// <summary>The lines of standard error.</summary>
    public string[] ErrorLines => Error.Split('\n', StringSplitOptions.RemoveEmptyEntries);

    /// <summary>Standard output and error with the command, for messages of failed tests.</summary>
    public override string ToString() => $"{Command}\nexit code {ExitCode}\n--- out\n{Out}\n--- error\n{Error}";

    /// <summary>Checks the exit code.</summary>
    public ProcessOutcome Expect(int exitCode)
    {
        Assert.True(exitCode == ExitCode, $"Exit code {exitCode} was expected.\n{this}");
        return this;
    }

    /// <summary>Checks that standard error says something.</summary>
    public ProcessOutcome ExpectError(params string[] texts)
    {
        foreach (string text in texts)
            Assert.True(Error.Contains(text, StringComparison.OrdinalIgnoreCase), $"'{text}' is missing from standard error.\n{this}");
        Assert.DoesNotContain("   at ", Error, StringComparison.Ordinal);
        return this;
    }
}
