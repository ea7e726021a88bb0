using System.Text;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>Refuses snapshots that HDF5 could not give back exactly.</summary>
internal static class SnapshotNames
{
    private static readonly UTF8Encoding Strict = new(false, throwOnInvalidBytes: true);

    /// <summary>Checks names and texts.</summary>
    /// <exception cref="ArgumentException">A name is used twice, is both a value and a group, or is malformed; a text cannot be stored.</exception>
    public static void Check(Snapshot snapshot)
    {
        HashSet<string> values = new(StringComparer.Ordinal);
        HashSet<string> groups = new(StringComparer.Ordinal);
        foreach (string name in snapshot.Numbers.Keys.Concat(snapshot.Integers.Keys).Concat(snapshot.Texts.Keys))
        {
            CheckParts(name);
            if (!values.Add(name))
                throw new ArgumentException($"The snapshot has two values named '{name}'.");
            for (int slash = name.IndexOf('/'); slash >= 0; slash = name.IndexOf('/', slash + 1))
                groups.Add(name[..slash]);
        }

        if (values.FirstOrDefault(groups.Contains) is { } both)
            throw new ArgumentException($"The snapshot has '{both}' both as a value and as a group.");
        foreach ((string name, string text) in snapshot.Texts)
            CheckText(name, text);
    }

    private static void CheckParts(string name)
    {
        if (name.Split('/').Any(part => part is "" or "." or ".."))
            throw new ArgumentException($"'{name}' is no path of names with '/' between them.");
        CheckText(name, name);
    }

    private static void CheckText(string name, string text)
    {
        if (text.Contains('\0', StringComparison.Ordinal))
            throw new ArgumentException($"The text '{name}' of the snapshot holds a zero character, where HDF5 would end it.");
        try
        {
            _ = Strict.GetByteCount(text);
        }
        catch (EncoderFallbackException cause)
        {
            throw new ArgumentException($"The text '{name}' of the snapshot is not valid Unicode.", cause);
        }
    }
}
