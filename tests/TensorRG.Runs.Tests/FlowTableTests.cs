using System.Text;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs.Tests;

public class FlowTableTests
{
    private const string Identity = "abc";

    [Fact]
    public void Records_come_back()
    {
        IReadOnlyList<StepRecord> records = Records(5);
        FlowContent content = FlowTable.Read(Identity, FlowTable.Write(Identity, records));
        Assert.Null(content.Defect);
        Assert.Equal(records.Count, content.Records.Count);
        for (int i = 0; i < records.Count; i++)
        {
            Assert.Equal(FlowRow.Write(records[i]), FlowRow.Write(content.Records[i]));
            Assert.Equal(records[i].Spectrum.AsEnumerable(), content.Records[i].Spectrum);
            Assert.Equal(records[i].VerticalBond.AsEnumerable(), content.Records[i].VerticalBond);
            Assert.Equal(records[i].HorizontalBond.AsEnumerable(), content.Records[i].HorizontalBond);
            Assert.Equal(records[i].Notices.AsEnumerable(), content.Records[i].Notices);
            Assert.Equal(records[i].Seconds, content.Records[i].Seconds);
        }
    }

    [Fact]
    public void Row_looks_as_documented()
    {
        string[] lines = Encoding.UTF8.GetString(FlowTable.Write(Identity, Records(0))).Split('\n');
        Assert.Equal(
            "step,length_scale,aspect_ratio,sites_per_tensor,vertical_bond,horizontal_bond,discarded_weight,"
            + "log_z_torus_per_site,torus_phase,log_z_per_site,degeneracy_ratio,spectrum,notices,seconds,check",
            lines[0]);
        Assert.StartsWith("0,1.0,1.0,1.0,\"0:3;(1,-2):4\",0:1,0.0,", lines[1], StringComparison.Ordinal);
        Assert.Equal("", lines[2]);
        Assert.Equal(3, lines.Length);
    }

    [Fact]
    public void Every_column_but_the_time_enters_the_check()
    {
        StepRecord record = Records(0)[0];
        StepRecord[] changed =
        [
            record with { LengthScale = 3 },
            record with { AspectRatio = 3 },
            record with { SitesPerTensor = 3 },
            record with { VerticalBond = [] },
            record with { HorizontalBond = [] },
            record with { DiscardedWeight = 3 },
            record with { LogZTorusPerSite = 3 },
            record with { TorusPhase = 3 },
            record with { LogZPerSite = 3 },
            record with { DegeneracyRatio = 3 },
            record with { Spectrum = [] },
            record with { Notices = ["x"] },
        ];
        Assert.Equal(FlowRow.Columns.Count - 2, changed.Select(Check).Append(Check(record)).Distinct().Count());
        Assert.Equal(Check(record), Check(record with { Seconds = double.NaN }));
    }

    [Fact]
    public void Rows_missing_swapped_or_of_another_run_are_found()
    {
        byte[] good = FlowTable.Write(Identity, Records(5));
        string[] lines = Encoding.UTF8.GetString(good).Split('\n');
        AssertDefect(2, [.. lines[..3], .. lines[4..]]);
        AssertDefect(2, [.. lines[..3], lines[4], lines[3], .. lines[5..]]);
        AssertDefect(5, [.. lines[..^2], lines[^2][..^3]]);
        AssertDefect(0, lines[1..]);
        AssertDefect(0, [""]);
        Assert.NotNull(FlowTable.Read("abd", good).Defect);
    }

    [Fact]
    public void Cells_with_commas_and_quotes_are_split_as_they_were_joined()
    {
        string[][] rows = [["a"], [""], ["", ""], ["a,b", "\"", "", "c\"d,"], ["\"\""], [",", ","]];
        Assert.All(rows, row => Assert.Equal(row, CsvLine.Split(CsvLine.Join(row))));
        Assert.Throws<FormatException>(() => CsvLine.Split("\"a"));
        Assert.Throws<FormatException>(() => CsvLine.Split("\"a\"b,c"));
    }

    private static void AssertDefect(int goodRows, string[] lines)
    {
        FlowContent content = FlowTable.Read(Identity, Encoding.UTF8.GetBytes(string.Join('\n', lines)));
        Assert.NotNull(content.Defect);
        Assert.Equal(goodRows, content.Records.Count);
    }

    private static string Check(StepRecord record) => Encoding.UTF8.GetString(FlowTable.Write(Identity, [record])).TrimEnd()[^16..];

    private static IReadOnlyList<StepRecord> Records(int steps)
    {
        FakeFlow flow = new(1);
        while (flow.Step < steps)
            flow.Advance();
        return flow.Records;
    }
}
