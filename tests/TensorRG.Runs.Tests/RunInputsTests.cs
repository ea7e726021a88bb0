using System.Collections.Immutable;
using System.Reflection;
using System.Text.Json.Nodes;

namespace TensorRG.Runs.Tests;

public class RunInputsTests
{
    /// <summary>One change for each property; <see cref="Every_property_enters_the_identity"/> finds a forgotten one.</summary>
    private static readonly Dictionary<string, Func<RunInputs, RunInputs>> Changes = new()
    {
        [nameof(RunInputs.Model)] = i => i with { Model = "potts" },
        [nameof(RunInputs.Definition)] = i => i with { Definition = "name = \"mine\"" },
        [nameof(RunInputs.NetworkForm)] = i => i with { NetworkForm = "row" },
        [nameof(RunInputs.Parameters)] = i => i with { Parameters = i.Parameters.SetItem("J", 2) },
        [nameof(RunInputs.Scheme)] = i => i with { Scheme = "hotrg" },
        [nameof(RunInputs.SchemeOptions)] = i => i with { SchemeOptions = i.SchemeOptions.SetItem("exponent", -0.25) },
        [nameof(RunInputs.BondDimension)] = i => i with { BondDimension = 17 },
        [nameof(RunInputs.Steps)] = i => i with { Steps = 7 },
        [nameof(RunInputs.Seed)] = i => i with { Seed = 43 },
        [nameof(RunInputs.MultipletGap)] = i => i with { MultipletGap = 0 },
        [nameof(RunInputs.Graded)] = i => i with { Graded = false },
        [nameof(RunInputs.ElementType)] = i => i with { ElementType = "complex" },
        [nameof(RunInputs.Backend)] = i => i with { Backend = "openblas" },
        [nameof(RunInputs.NumericsVersion)] = i => i with { NumericsVersion = 2 },
    };

    [Fact]
    public void Identity_is_known()
    {
        // Computed once with Python's json and hashlib from the canonical text below.
        const string canonical = "{\"backend\":\"managed\",\"bondDimension\":16,\"elementType\":\"double\",\"graded\":true,"
            + "\"model\":\"ising\",\"multipletGap\":1e-08,\"numericsVersion\":1,"
            + "\"parameters\":{\"J\":1,\"boundary\":\"periodic\",\"temperature\":2.269185314213022},\"scheme\":\"trg\","
            + "\"schemeOptions\":{\"exponent\":-0.5},\"seed\":42,\"steps\":6}";
        Assert.Equal(canonical, System.Text.Encoding.UTF8.GetString(CanonicalJson.Compact(RunInputsJson.Write(Sample.Inputs()))));
        Assert.Equal("741aa4c652e6723dc8724afc2c12cb9fcbd8da891da5efbb5a556b616507218c", Sample.Inputs().Identity);
    }

    [Fact]
    public void Every_property_enters_the_identity()
    {
        IEnumerable<string> properties = typeof(RunInputs)
            .GetProperties(BindingFlags.Public | BindingFlags.Instance)
            .Select(p => p.Name)
            .Where(n => n != nameof(RunInputs.Identity));
        foreach (string name in properties)
        {
            RunInputs changed = Changes[name](Sample.Inputs());
            Assert.NotEqual(Sample.Inputs().Identity, changed.Identity);
            Assert.NotEqual(Sample.Inputs(), changed);
            Assert.Contains(char.ToLowerInvariant(name[0]) + name[1..], Assert.Single(RunInputsJson.Differences(Sample.Inputs(), changed)), StringComparison.Ordinal);
        }
    }

    [Fact]
    public void Order_and_comparer_of_parameters_do_not_matter()
    {
        RunInputs other = Sample.Inputs() with
        {
            Parameters = ImmutableSortedDictionary.Create<string, InputValue>(Comparer<string>.Create((a, b) => string.CompareOrdinal(b, a)))
                .AddRange(Sample.Inputs().Parameters),
        };
        Assert.Equal(Sample.Inputs().Identity, other.Identity);
        Assert.Equal(Sample.Inputs(), other);
    }

    [Fact]
    public void Values_of_another_kind_or_sign_are_other_values()
    {
        InputValue[] different = [0, 0.0, -0.0, "0", "0.0", false, 1, true, "true"];
        string[] identities = [.. different.Select(v => (Sample.Inputs() with { Parameters = RunInputs.Empty.Add("x", v) }).Identity)];
        Assert.Equal(different.Length, identities.Distinct().Count());
        Assert.Equal(different.Length, different.Distinct().Count());
    }

    [Fact]
    public void Inputs_come_back_from_json()
    {
        RunInputs inputs = Sample.Inputs() with
        {
            Parameters = RunInputs.Empty.Add("β", -0.0).Add("n", long.MaxValue).Add("on", true).Add("big", 1e300).Add("text", "a\"b\n"),
        };
        RunInputs back = RunInputsJson.Read(JsonNode.Parse(CanonicalJson.Compact(RunInputsJson.Write(inputs)))!.AsObject());
        Assert.Equal(inputs, back);
        Assert.True(double.IsNegative(back.Parameters["β"].ToDouble()));
        Assert.Equal(long.MaxValue, back.Parameters["n"].ToInt64());
        Assert.True(back.Parameters["on"].ToBoolean());
        Assert.Throws<InvalidOperationException>(() => back.Parameters["text"].ToDouble());
        Assert.Throws<InvalidOperationException>(() => back.Parameters["big"].ToInt64());
    }

    [Fact]
    public void Inputs_out_of_range_are_refused()
    {
        Assert.Throws<ArgumentException>(() => InputValue.FromDouble(double.NaN));
        RunInputs[] bad =
        [
            Sample.Inputs() with { Model = "" },
            Sample.Inputs() with { BondDimension = 0 },
            Sample.Inputs() with { Steps = -1 },
            Sample.Inputs() with { MultipletGap = double.NaN },
            Sample.Inputs() with { MultipletGap = -1 },
            Sample.Inputs() with { Parameters = RunInputs.Empty.Add("x", "\uDC00") },
        ];
        foreach (RunInputs inputs in bad)
            Assert.ThrowsAny<ArgumentException>(inputs.Validate);
    }
}
