namespace TensorRG.EndToEnd.Harness;

/// <summary>Everything in a finished run that must not depend on how it came about.</summary>
internal sealed class RunBits
{
    private readonly byte[] _result;
    private readonly byte[] _state;
    private readonly string _flow;
    private readonly int _step;

    private RunBits(RunFiles run)
    {
        _step = run.Steps[^1];
        _result = File.ReadAllBytes(run.Result);
        _state = File.ReadAllBytes(run.State(_step));
        _flow = WithoutSeconds(File.ReadAllLines(run.Flow));
    }

    public static RunBits Of(string folder) => new(new RunFiles(folder));

    /// <summary>Checks that a run has the same bits.</summary>
    /// <param name="folder">The run.</param>
    /// <param name="story">What was done to it, for the message.</param>
    public void AssertSame(string folder, string story)
    {
        RunBits other = Of(folder);
        Assert.True(_step == other._step, $"Last step {other._step}, not {_step}. {story}");
        Assert.True(_flow == other._flow, $"flow.csv differs.\n{_flow}\n---\n{other._flow}\n{story}");
        Assert.True(_result.AsSpan().SequenceEqual(other._result), $"result.json differs. {story}");
        Assert.True(_state.AsSpan().SequenceEqual(other._state), $"The last checkpoint differs. {story}");
        Assert.False(new RunFiles(folder).HasAny("*.tmp"), $"Half-written files are left. {story}");
    }

    /// <summary>Times of steps are the one thing that differs between two runs.</summary>
    private static string WithoutSeconds(string[] lines)
    {
        int column = Array.IndexOf(lines[0].Split(','), "seconds");
        Assert.True(column >= 0, "flow.csv has no column 'seconds'.");
        int fromEnd = lines[0].Split(',').Length - column;
        return string.Join('\n', lines.Select(line =>
        {
            // Counted from the end: texts with commas stand before.
            string[] cells = line.Split(',');
            cells[^fromEnd] = "";
            return string.Join(',', cells);
        }));
    }
}
