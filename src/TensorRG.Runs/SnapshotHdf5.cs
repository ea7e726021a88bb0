using System.Runtime.InteropServices;
using PureHDF;
using TensorRG.CoarseGraining;

namespace TensorRG.Runs;

/// <summary>
/// A snapshot as an HDF5 file: names with '/' become nested groups, arrays of reals and integers one-dimensional
/// datasets of 64-bit floats and integers, texts scalar UTF-8 strings; the root carries the attributes schema,
/// identity and step. The bytes depend on the snapshot alone: values are written in the order of their names, and no
/// time enters.
/// </summary>
internal static class SnapshotHdf5
{
    private const int MetadataBytes = 64 * 1024;
    private const string Schema = "schema";
    private const string Identity = "identity";
    private const string Step = "step";

    /// <summary>Writes a snapshot, leaving the first bytes of the file for the caller.</summary>
    /// <exception cref="ArgumentException">The snapshot cannot be stored.</exception>
    /// <exception cref="RunStoreException">The snapshot is larger than a file in memory can be.</exception>
    public static byte[] Write(Snapshot snapshot, string identity, int reservedBytes)
    {
        SnapshotNames.Check(snapshot);
        H5File file = new();
        file.Attributes[Schema] = RunSchema.Current;
        file.Attributes[Identity] = identity;
        file.Attributes[Step] = snapshot.Step;
        foreach ((string name, object value) in InOrder(snapshot))
            Add(file, name, value);
        using MemoryStream stream = new(Capacity(snapshot, reservedBytes));
        file.Write(stream, new H5WriteOptions(UserBlockSize: (ulong)reservedBytes));
        return stream.ToArray();
    }

    /// <summary>Reads what <see cref="Write"/> wrote.</summary>
    /// <returns>The snapshot, and the identity and schema that stand in the file.</returns>
    /// <exception cref="Exception">The file is no such HDF5 file. Check its checksum first: the parser trusts its input.</exception>
    public static (Snapshot Snapshot, string Identity, int Schema) Read(byte[] bytes)
    {
        using var file = H5File.Open(new MemoryStream(bytes, writable: false));
        Dictionary<string, double[]> numbers = new(StringComparer.Ordinal);
        Dictionary<string, long[]> integers = new(StringComparer.Ordinal);
        Dictionary<string, string> texts = new(StringComparer.Ordinal);
        Collect(file, "", numbers, integers, texts);
        Snapshot snapshot = new(file.Attribute(Step).Read<int>(), numbers, integers, texts);
        return (snapshot, file.Attribute(Identity).Read<string>(), file.Attribute(Schema).Read<int>());
    }

    /// <summary>Whether two snapshots are equal bit by bit.</summary>
    public static bool Same(Snapshot left, Snapshot right) =>
        left.Step == right.Step
        && Same(left.Numbers, right.Numbers, (a, b) => Bits(a).SequenceEqual(Bits(b)))
        && Same(left.Integers, right.Integers, (a, b) => a.AsSpan().SequenceEqual(b))
        && Same(left.Texts, right.Texts, (a, b) => a == b);

    private static bool Same<T>(
        IReadOnlyDictionary<string, T> left, IReadOnlyDictionary<string, T> right, Func<T, T, bool> equal) =>
        left.Count == right.Count && left.All(p => right.TryGetValue(p.Key, out T? other) && equal(p.Value, other));

    private static ReadOnlySpan<long> Bits(double[] values) => MemoryMarshal.Cast<double, long>(values);

    /// <summary>Room for the arrays, so that the stream need not grow by doubling.</summary>
    private static int Capacity(Snapshot snapshot, int reservedBytes)
    {
        long values = snapshot.Numbers.Values.Sum(v => v.LongLength) + snapshot.Integers.Values.Sum(v => v.LongLength);
        long bytes = reservedBytes + MetadataBytes + (sizeof(double) * values);
        return bytes <= Array.MaxLength ? (int)bytes : throw new RunStoreException(
            RunStoreProblem.Storage,
            $"The state takes {bytes} bytes; a checkpoint holds at most {Array.MaxLength}. Use a smaller bond dimension.");
    }

    private static IEnumerable<(string Name, object Value)> InOrder(Snapshot snapshot) =>
        snapshot.Numbers.Select(p => (p.Key, (object)p.Value))
            .Concat(snapshot.Integers.Select(p => (p.Key, (object)p.Value)))
            .Concat(snapshot.Texts.Select(p => (p.Key, (object)p.Value)))
            .OrderBy(p => p.Key, StringComparer.Ordinal);

    private static void Add(H5Group root, string name, object value)
    {
        H5Group group = root;
        string[] parts = name.Split('/');
        foreach (string part in parts[..^1])
        {
            if (!group.TryGetValue(part, out object? inner))
                group[part] = inner = new H5Group();
            group = (H5Group)inner!;
        }

        group[parts[^1]] = value;
    }

    private static void Collect(
        IH5Group group,
        string prefix,
        Dictionary<string, double[]> numbers,
        Dictionary<string, long[]> integers,
        Dictionary<string, string> texts)
    {
        foreach (IH5Object child in group.Children())
        {
            string name = prefix + child.Name;
            if (child is IH5Group inner)
                Collect(inner, name + "/", numbers, integers, texts);
            else if (child is IH5Dataset { Type.Class: H5DataTypeClass.FloatingPoint } reals)
                numbers.Add(name, reals.Read<double[]>());
            else if (child is IH5Dataset { Type.Class: H5DataTypeClass.FixedPoint } whole)
                integers.Add(name, whole.Read<long[]>());
            else
                texts.Add(name, ((IH5Dataset)child).Read<string>());
        }
    }
}
