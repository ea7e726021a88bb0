using System.Collections.Immutable;
using System.Text.Json;

namespace TensorRG.CoarseGraining;

/// <summary>
/// Step records in snapshots: one column of numbers a field under <c>records/</c>, and texts for bonds, spectra and notices.
/// Step times are left out, so that a snapshot depends on the inputs alone; a restored record has a time of NaN.
/// </summary>
internal static class RecordCodec
{
    private static readonly (string Name, Func<StepRecord, double> Get)[] Columns =
    [
        ("length-scale", static r => r.LengthScale),
        ("aspect-ratio", static r => r.AspectRatio),
        ("sites-per-tensor", static r => r.SitesPerTensor),
        ("discarded-weight", static r => r.DiscardedWeight),
        ("log-z-torus-per-site", static r => r.LogZTorusPerSite),
        ("torus-phase", static r => r.TorusPhase),
        ("log-z-per-site", static r => r.LogZPerSite),
        ("degeneracy-ratio", static r => r.DegeneracyRatio),
    ];

    public static void Write(SnapshotWriter writer, IReadOnlyList<StepRecord> records)
    {
        foreach ((string name, Func<StepRecord, double> get) in Columns)
            writer.Add("records/" + name, [.. records.Select(get)]);
        writer.Add("records/vertical-bonds", JsonSerializer.Serialize(records.Select(static r => r.VerticalBond)));
        writer.Add("records/horizontal-bonds", JsonSerializer.Serialize(records.Select(static r => r.HorizontalBond)));
        writer.Add("records/spectra", JsonSerializer.Serialize(records.Select(static r => r.Spectrum)));
        writer.Add("records/notices", JsonSerializer.Serialize(records.Select(static r => r.Notices)));
    }

    public static List<StepRecord> Read(SnapshotReader reader)
    {
        Dictionary<string, double[]> columns = Columns.ToDictionary(static c => c.Name, c => reader.Numbers("records/" + c.Name));
        ImmutableArray<SectorSize>[] vertical = Texts<SectorSize>(reader, "vertical-bonds");
        ImmutableArray<SectorSize>[] horizontal = Texts<SectorSize>(reader, "horizontal-bonds");
        ImmutableArray<SpectrumLine>[] spectra = Texts<SpectrumLine>(reader, "spectra");
        ImmutableArray<string>[] notices = Texts<string>(reader, "notices");
        int count = vertical.Length;
        if (columns.Values.Any(c => c.Length != count) || horizontal.Length != count || spectra.Length != count || notices.Length != count)
            throw new SnapshotException("The records of the snapshot have columns of different lengths.");
        return [.. Enumerable.Range(0, count).Select(i => new StepRecord
        {
            Step = i,
            LengthScale = columns["length-scale"][i],
            AspectRatio = columns["aspect-ratio"][i],
            SitesPerTensor = columns["sites-per-tensor"][i],
            VerticalBond = vertical[i],
            HorizontalBond = horizontal[i],
            DiscardedWeight = columns["discarded-weight"][i],
            LogZTorusPerSite = columns["log-z-torus-per-site"][i],
            TorusPhase = columns["torus-phase"][i],
            LogZPerSite = columns["log-z-per-site"][i],
            DegeneracyRatio = columns["degeneracy-ratio"][i],
            Spectrum = spectra[i],
            Seconds = double.NaN,
            Notices = notices[i],
        })];
    }

    private static ImmutableArray<TItem>[] Texts<TItem>(SnapshotReader reader, string name)
    {
        try
        {
            return JsonSerializer.Deserialize<ImmutableArray<TItem>[]>(reader.Text("records/" + name)) ?? [];
        }
        catch (JsonException e)
        {
            throw new SnapshotException($"The records '{name}' of the snapshot cannot be read.", e);
        }
    }
}
