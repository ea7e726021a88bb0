using System.Collections.Immutable;
using System.Numerics;
using System.Runtime.InteropServices;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining;

/// <summary>
/// Network states in snapshots. Under <c>tensors/NAME</c>: <c>arrows</c> (+1 in, -1 out, one a leg), <c>sectors</c> (number a leg),
/// <c>charges</c> (four integers a sector, leg after leg), <c>dimensions</c> (one a sector), <c>elements</c> (blocks in
/// lexicographic order of their sectors, each row-major; real and imaginary parts interleaved for complex ones). Under <c>weights/NAME</c> the same for one leg.
/// </summary>
internal static class StateCodec
{
    public static void Write<T>(SnapshotWriter writer, NetworkState<T> state)
        where T : unmanaged, INumberBase<T>
    {
        foreach ((string name, Tensor<T> tensor) in state.Tensors)
        {
            WriteLegs(writer, "tensors/" + name, tensor.Legs);
            writer.Add($"tensors/{name}/elements", MemoryMarshal.Cast<T, double>(tensor.Elements).ToArray());
        }

        foreach ((string name, BondWeights weights) in state.Weights)
        {
            WriteLegs(writer, "weights/" + name, [weights.Leg]);
            writer.Add($"weights/{name}/elements", [.. weights.Values.SelectMany(static v => v)]);
        }
    }

    public static NetworkState<T> Read<T>(SnapshotReader reader, AbelianGroup group)
        where T : unmanaged, INumberBase<T>
    {
        ImmutableSortedDictionary<string, Tensor<T>>.Builder tensors = ImmutableSortedDictionary.CreateBuilder<string, Tensor<T>>(StringComparer.Ordinal);
        foreach (string name in reader.Children("tensors"))
        {
            Tensor<T> tensor = Tensor<T>.Zeros(ReadLegs(reader, "tensors/" + name, group));
            Span<double> elements = MemoryMarshal.Cast<T, double>(tensor.Elements);
            reader.Numbers($"tensors/{name}/elements", elements.Length).CopyTo(elements);
            tensors.Add(name, tensor);
        }

        ImmutableSortedDictionary<string, BondWeights>.Builder weights = ImmutableSortedDictionary.CreateBuilder<string, BondWeights>(StringComparer.Ordinal);
        foreach (string name in reader.Children("weights"))
            weights.Add(name, ReadWeights(reader, "weights/" + name, group));
        return new NetworkState<T>(tensors.ToImmutable(), weights.ToImmutable());
    }

    private static BondWeights ReadWeights(SnapshotReader reader, string path, AbelianGroup group)
    {
        Leg leg = ReadLegs(reader, path, group)[0];
        double[] all = reader.Numbers(path + "/elements", leg.Dimension);
        return new BondWeights(leg, [.. leg.Sectors.Select((s, i) => all.AsSpan(leg.Start(i), s.Dimension).ToArray())]);
    }

    private static void WriteLegs(SnapshotWriter writer, string path, ImmutableArray<Leg> legs)
    {
        writer.Add(path + "/arrows", legs.Select(static leg => (int)leg.Arrow));
        writer.Add(path + "/sectors", legs.Select(static leg => leg.Sectors.Length));
        writer.Add(path + "/dimensions", legs.SelectMany(static leg => leg.Sectors).Select(static s => s.Dimension));
        writer.Add(path + "/charges", legs.SelectMany(static leg => leg.Sectors)
            .SelectMany(static s => (int[])[s.Charge.First, s.Charge.Second, s.Charge.Third, s.Charge.Fourth]));
    }

    private static ImmutableArray<Leg> ReadLegs(SnapshotReader reader, string path, AbelianGroup group)
    {
        int[] arrows = reader.Integers(path + "/arrows");
        int[] counts = reader.Integers(path + "/sectors", arrows.Length);
        if (arrows.Length == 0 || arrows.Any(static a => a is not (1 or -1)) || counts.Any(static n => n < 0))
            throw new SnapshotException($"The snapshot holds impossible legs under '{path}': directions are 1 or -1, numbers of sectors are not negative.");
        int[] dimensions = reader.Integers(path + "/dimensions", counts.Sum());
        int[] charges = reader.Integers(path + "/charges", 4L * dimensions.Length);
        ImmutableArray<Leg>.Builder legs = ImmutableArray.CreateBuilder<Leg>(arrows.Length);
        int next = 0;
        for (int i = 0; i < arrows.Length; i++)
        {
            var sectors = new Sector[counts[i]];
            for (int s = 0; s < sectors.Length; s++, next++)
                sectors[s] = new Sector(new Charge(charges[4 * next], charges[(4 * next) + 1], charges[(4 * next) + 2], charges[(4 * next) + 3]), dimensions[next]);
            legs.Add(new Leg(group, (Arrow)arrows[i], sectors));
        }

        return legs.MoveToImmutable();
    }
}
