using System.Numerics;
using System.Text.Json;
using TensorRG.Tensors;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.CoarseGraining.Tests;

/// <summary>Saved and restored flows go on with the same bits; damaged snapshots are refused and change nothing.</summary>
public sealed class SnapshotTests
{
    private const int Steps = 5;
    private static readonly SchemeSettings Cut = new(new CutRule(6)) { Decomposition = DecompositionMode.Iterative };

    [Theory]
    [MemberData(nameof(SchemeCase.SchemesAndSites), MemberType = typeof(SchemeCase))]
    public void A_restored_flow_goes_on_with_the_same_bits(string scheme, SiteKind kind)
    {
        Check(scheme, new RandomSite(5).Positive<double>(kind));
        Check(scheme, new RandomSite(5).Positive<Complex>(kind));
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Saving_does_not_disturb_a_flow(string scheme)
    {
        Tensor<double> site = Sites.Ising(Sites.CriticalCoupling);
        Flow<double> quiet = SchemeCase.Flow(scheme, site, Cut).Run(Steps), watched = SchemeCase.Flow(scheme, site, Cut);
        for (int step = 0; step < Steps; step++)
        {
            SchemeCase.SameSnapshots(watched.Save(), watched.Save());
            watched.Advance();
        }

        SchemeCase.SameSnapshots(quiet.Save(), watched.Save());
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_snapshot_without_one_of_its_values_is_refused(string scheme)
    {
        Snapshot whole = Whole(scheme);
        foreach (string name in whole.Numbers.Keys)
            Refused(scheme, Altered(whole, numbers: n => n.Remove(name)), name);
        foreach (string name in whole.Integers.Keys)
            Refused(scheme, Altered(whole, integers: n => n.Remove(name)), name);
        foreach (string name in whole.Texts.Keys)
            Refused(scheme, Altered(whole, texts: n => n.Remove(name)), name);
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_snapshot_without_one_of_its_tensors_or_weights_is_refused(string scheme)
    {
        Snapshot whole = Whole(scheme);
        foreach (string group in whole.Integers.Keys.Select(static name => name[..(name.LastIndexOf('/') + 1)]).Distinct())
        {
            Refused(scheme, Altered(
                whole,
                numbers: n => Drop(n, group),
                integers: n => Drop(n, group)), group);
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_snapshot_with_an_array_of_the_wrong_length_is_refused(string scheme)
    {
        Snapshot whole = Whole(scheme);
        foreach (string name in whole.Numbers.Keys)
        {
            Refused(scheme, Altered(whole, numbers: n => n[name] = [.. n[name], 1]), name);
            Refused(scheme, Altered(whole, numbers: n => n[name] = n[name][1..]), name);
        }

        foreach (string name in whole.Integers.Keys)
        {
            Refused(scheme, Altered(whole, integers: n => n[name] = [.. n[name], 1]), name);
            Refused(scheme, Altered(whole, integers: n => n[name] = n[name][1..]), name);
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_snapshot_with_impossible_legs_is_refused(string scheme)
    {
        Snapshot whole = Whole(scheme);
        foreach (string name in whole.Integers.Keys)
        {
            foreach (long wrong in new[] { 7, -3, long.MaxValue, long.MinValue })
            {
                if (name.EndsWith("/charges", StringComparison.Ordinal) && wrong is > -10 and < 10)
                    continue; // Any charge is reduced to one of the group; the next test covers a charge that does not fit.
                Refused(scheme, Altered(whole, integers: n => n[name] = [wrong, .. n[name][1..]]), $"{name} = {wrong}");
            }
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void A_tensor_of_another_shape_is_refused(string scheme)
    {
        Snapshot whole = Whole(scheme), other = SchemeCase.Flow(scheme, Sites.Ising(Sites.CriticalCoupling), new SchemeSettings(new CutRule(3))).Run(Steps).Save();
        foreach (string path in whole.Numbers.Keys.Where(static n => n.EndsWith("/elements", StringComparison.Ordinal)).Select(static n => n[..^"elements".Length]))
        {
            Refused(scheme, Altered(
                whole,
                numbers: n => n[path + "elements"] = other.Numbers[path + "elements"],
                integers: n => Replace(n, other.Integers, path)), path);
        }
    }

    [Theory]
    [MemberData(nameof(SchemeCase.Schemes), MemberType = typeof(SchemeCase))]
    public void Altered_elements_are_refused(string scheme)
    {
        Snapshot whole = Whole(scheme);
        foreach (string name in whole.Numbers.Keys.Where(static n => n.EndsWith("/elements", StringComparison.Ordinal)))
        {
            Refused(scheme, Altered(whole, numbers: n => n[name] = [.. n[name].Select(static x => 2 * x)]), name);
            Refused(scheme, Altered(whole, numbers: n => n[name] = [double.NaN, .. n[name][1..]]), name);
        }
    }

    [Fact]
    public void Unreadable_records_and_a_wrong_step_are_refused()
    {
        string scheme = SchemeRegistry.Default.Name;
        Snapshot whole = Whole(scheme);
        foreach (string name in whole.Texts.Keys)
        {
            foreach (string wrong in new[] { "", "null", "[]", "{", "[null]", "[[{\"Charge\":3}]]" })
                Refused(scheme, Altered(whole, texts: t => t[name] = wrong), $"{name} = {wrong}");
        }

        Refused(scheme, new Snapshot(whole.Step + 1, whole.Numbers, whole.Integers, whole.Texts), "step");
    }

    /// <summary>The format is a promise to other programs that read it: names, and how a tensor is laid out.</summary>
    [Fact]
    public void A_saved_tensor_reads_as_documented()
    {
        Tensor<Complex> site = new RandomSite(8).Positive<Complex>(SiteKind.Phase);
        Snapshot snapshot = SchemeCase.Flow("hotrg", site, Cut).Save();
        Assert.Equal([1, 1, -1, -1], snapshot.Integers["tensors/site/arrows"]);
        Assert.Equal([2, 3, 2, 3], snapshot.Integers["tensors/site/sectors"]);
        Assert.Equal([1, 1, 1, 1, 1, 1, 1, 1, 1, 1], snapshot.Integers["tensors/site/dimensions"]);
        Assert.Equal([0, 0, 0, 0, 1, 0, 0, 0, -1, 0, 0, 0], snapshot.Integers["tensors/site/charges"].Take(12));
        double[] elements = snapshot.Numbers["tensors/site/elements"];
        Assert.Equal(2 * site.StoredCount, elements.Length);
        Complex first = site.Elements[0], second = site.Elements[1], ratio = new Complex(elements[2], elements[3]) / new Complex(elements[0], elements[1]);
        SchemeCase.Near(second / first, ratio, 1, 1e-14, "ratio of the first elements");
        Assert.Equal(2, snapshot.Numbers["log-scale"].Length);
        Assert.Equal("[[{\"Charge\":\"0\",\"Dimension\":1},{\"Charge\":\"1\",\"Dimension\":1}]]", snapshot.Texts["records/vertical-bonds"]);
        Assert.Equal(1, JsonDocument.Parse(snapshot.Texts["records/spectra"]).RootElement.GetArrayLength());
    }

    private static void Check<T>(string scheme, Tensor<T> site)
        where T : unmanaged, INumberBase<T>
    {
        Flow<T> whole = SchemeCase.Flow(scheme, site, Cut, 2, 0.25);
        var saved = new List<Snapshot> { whole.Save() };
        for (int step = 1; step <= Steps; step++)
        {
            whole.Advance();
            saved.Add(whole.Save());
        }

        for (int step = 0; step <= Steps; step++)
        {
            Flow<T> resumed = SchemeCase.Flow(scheme, site, Cut, 2, 0.25);
            resumed.Restore(saved[step]);
            Assert.Equal(step, resumed.Step);
            SchemeCase.SameSnapshots(saved[step], resumed.Save());
            resumed.Run(Steps - step);
            SchemeCase.SameRecords(whole.Records, resumed.Records);
            SchemeCase.SameSnapshots(saved[^1], resumed.Save());
        }
    }

    private static Snapshot Whole(string scheme)
        => SchemeCase.Flow(scheme, Sites.Ising(Sites.CriticalCoupling), Cut).Run(Steps).Save();

    /// <summary>The flow that refuses a snapshot still has its own state.</summary>
    private static void Refused(string scheme, Snapshot damaged, string what)
    {
        Flow<double> flow = SchemeCase.Flow(scheme, Sites.Ising(0.3), Cut).Run(1);
        Snapshot before = flow.Save();
        Exception? exception = Record.Exception(() => flow.Restore(damaged));
        Assert.True(exception is SnapshotException, $"without the right {what}: {exception?.ToString() ?? "no exception"}");
        SchemeCase.SameSnapshots(before, flow.Save());
    }

    private static Snapshot Altered(
        Snapshot whole,
        Action<Dictionary<string, double[]>>? numbers = null,
        Action<Dictionary<string, long[]>>? integers = null,
        Action<Dictionary<string, string>>? texts = null)
    {
        var n = new Dictionary<string, double[]>(whole.Numbers);
        var i = new Dictionary<string, long[]>(whole.Integers);
        var t = new Dictionary<string, string>(whole.Texts);
        numbers?.Invoke(n);
        integers?.Invoke(i);
        texts?.Invoke(t);
        return new Snapshot(whole.Step, n, i, t);
    }

    private static void Drop<TValue>(Dictionary<string, TValue> values, string group)
    {
        foreach (string name in values.Keys.Where(name => name.StartsWith(group, StringComparison.Ordinal)).ToArray())
            values.Remove(name);
    }

    private static void Replace(Dictionary<string, long[]> values, IReadOnlyDictionary<string, long[]> other, string path)
    {
        foreach (string name in other.Keys.Where(name => name.StartsWith(path, StringComparison.Ordinal)))
            values[name] = other[name];
    }
}
