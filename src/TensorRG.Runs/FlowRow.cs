using System.Globalization;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>One record of the flow as a row of flow.csv.</summary>
internal static class FlowRow
{
    /// <summary>Names of the columns of a row; seconds and check come last.</summary>
    public static IReadOnlyList<string> Columns { get; } =
    [
        "step", "length_scale", "aspect_ratio", "sites_per_tensor", "vertical_bond", "horizontal_bond",
        "discarded_weight", "log_z_torus_per_site", "torus_phase", "log_z_per_site", "degeneracy_ratio",
        "spectrum", "notices", "seconds", "check",
    ];

    /// <summary>The row without its last two cells.</summary>
    public static string Write(StepRecord record) => CsvLine.Join(
    [
        record.Step.ToString(CultureInfo.InvariantCulture),
        NumberText.Of(record.LengthScale),
        NumberText.Of(record.AspectRatio),
        NumberText.Of(record.SitesPerTensor),
        CellList.Write(record.VerticalBond),
        CellList.Write(record.HorizontalBond),
        NumberText.Of(record.DiscardedWeight),
        NumberText.Of(record.LogZTorusPerSite),
        NumberText.Of(record.TorusPhase),
        NumberText.Of(record.LogZPerSite),
        NumberText.Of(record.DegeneracyRatio),
        CellList.Write(record.Spectrum),
        CellList.Write(record.Notices),
    ]);

    /// <summary>The record in the cells of a row.</summary>
    /// <exception cref="FormatException">A cell does not hold what it should.</exception>
    public static StepRecord Read(IReadOnlyList<string> cells, double seconds) => new()
    {
        Step = int.Parse(cells[0], NumberStyles.None, CultureInfo.InvariantCulture),
        LengthScale = CellList.Real(cells[1]),
        AspectRatio = CellList.Real(cells[2]),
        SitesPerTensor = CellList.Real(cells[3]),
        VerticalBond = CellList.ReadBond(cells[4]),
        HorizontalBond = CellList.ReadBond(cells[5]),
        DiscardedWeight = CellList.Real(cells[6]),
        LogZTorusPerSite = CellList.Real(cells[7]),
        TorusPhase = CellList.Real(cells[8]),
        LogZPerSite = CellList.Real(cells[9]),
        DegeneracyRatio = CellList.Real(cells[10]),
        Spectrum = CellList.ReadSpectrum(cells[11]),
        Notices = CellList.ReadNotices(cells[12]),
        Seconds = seconds,
    };
}
