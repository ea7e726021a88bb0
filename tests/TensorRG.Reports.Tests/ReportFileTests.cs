using System.Text;

namespace TensorRG.Reports.Tests;

public sealed class ReportFileTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("tensorrg-reports-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void Writes_into_new_folders_replaces_and_leaves_nothing_behind()
    {
        var path = Path.Combine(_folder, "new", "table.csv");
        ReportFile.WriteText(path, "old, longer text");
        ReportFile.WriteText(path, "χ\r\n");
        Assert.Equal(Encoding.UTF8.GetBytes("χ\r\n"), File.ReadAllBytes(path));
        Assert.Single(Directory.GetFiles(Path.GetDirectoryName(path)!));
    }

    [Fact]
    public void A_target_that_cannot_be_replaced_is_an_error_and_leaves_nothing_behind()
    {
        var path = Path.Combine(_folder, "table.csv");
        Directory.CreateDirectory(path);
        Assert.ThrowsAny<Exception>(() => ReportFile.WriteText(path, "x"));
        Assert.Empty(Directory.GetFiles(_folder));
    }

    [Fact]
    public void A_figure_writes_both_files()
    {
        var rendered = new RenderedFigure("<svg/>", [1, 2, 3], []);
        var paths = rendered.Write(Path.Combine(_folder, "figure"));
        Assert.Equal(["figure.svg", "figure.png"], paths.Select(Path.GetFileName));
        Assert.Equal("<svg/>", File.ReadAllText(paths[0]));
        Assert.Equal([1, 2, 3], File.ReadAllBytes(paths[1]));
    }
}
