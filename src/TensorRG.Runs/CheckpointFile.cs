using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// The bytes of a checkpoint: a seal of 512 bytes of plain text in the user block that HDF5 leaves to applications,
/// then the HDF5 file proper. The seal states identity, step and the SHA-256 of everything behind it, and must match
/// to the byte, so that a change of any bit is found before the HDF5 parser sees the file. One file holds both data and
/// checksum: there is no instant at which one is there without the other.
/// </summary>
internal static class CheckpointFile
{
    /// <summary>Length of the seal: the smallest user block that HDF5 allows.</summary>
    public const int SealBytes = 512;

    /// <summary>Writes a snapshot and proves by reading it again that it comes back bit by bit.</summary>
    /// <exception cref="ArgumentException">The snapshot cannot be stored exactly.</exception>
    public static byte[] Write(Snapshot snapshot, string identity)
    {
        byte[] bytes = SnapshotHdf5.Write(snapshot, identity, SealBytes);
        Seal(identity, snapshot.Step, bytes).CopyTo(bytes, 0);
        if (!SnapshotHdf5.Same(snapshot, Read(bytes, identity, snapshot.Step)))
            throw new ArgumentException("The snapshot does not come back from HDF5 as it was.");
        return bytes;
    }

    /// <summary>Reads a checkpoint of a given run and step.</summary>
    /// <exception cref="RunStoreException">The bytes are not a checkpoint of that run and step as it was written.</exception>
    public static Snapshot Read(byte[] bytes, string identity, int step)
    {
        if (bytes.Length <= SealBytes)
            throw Damaged("it is truncated");
        byte[] seal = Seal(identity, step, bytes);
        if (!bytes.AsSpan(0, SealBytes).SequenceEqual(seal))
            throw Damaged(Diagnose(bytes, identity, step));
        (Snapshot snapshot, string storedIdentity, int schema) = SnapshotHdf5.Read(bytes);
        if (schema != RunSchema.Current)
            throw Damaged($"its schema is {schema}, not {RunSchema.Current}");
        return storedIdentity == identity && snapshot.Step == step
            ? snapshot
            : throw Damaged("its content belongs to another run or step");
    }

    private static byte[] Seal(string identity, int step, byte[] bytes)
    {
        string hash = Convert.ToHexStringLower(SHA256.HashData(bytes.AsSpan(SealBytes)));
        string text = string.Create(CultureInfo.InvariantCulture, $"""
            TensorRG checkpoint, schema {RunSchema.Current}
            identity {identity}
            step {step}
            sha256 {hash}
            The HDF5 file begins at byte 512 (a user block, which h5py skips by itself).
            sha256 is that of all bytes from there on: tail -c +513 FILE | sha256sum
            """).ReplaceLineEndings("\n");
        return Encoding.ASCII.GetBytes(text.PadRight(SealBytes - 1) + '\n');
    }

    /// <summary>Why a seal is wrong, as well as its text tells.</summary>
    private static string Diagnose(byte[] bytes, string identity, int step)
    {
        string[] lines = Encoding.ASCII.GetString(bytes, 0, SealBytes).Split('\n');
        bool intact = lines.Length > 3 && lines[0].StartsWith("TensorRG checkpoint", StringComparison.Ordinal);
        if (intact && lines[1] != $"identity {identity}")
            return "it belongs to another run, or its seal is damaged";
        if (intact && lines[2] != string.Create(CultureInfo.InvariantCulture, $"step {step}"))
            return "it is of another step than its name says, or its seal is damaged";
        return "its content does not match its checksum";
    }

    private static RunStoreException Damaged(string why) => new(RunStoreProblem.Damaged, why);
}
