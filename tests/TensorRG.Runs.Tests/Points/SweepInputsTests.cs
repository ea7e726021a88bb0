using System.Text.Json.Nodes;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Physics.Measurements;
using TensorRG.Runs.Points;

namespace TensorRG.Runs.Tests.Points;

public class SweepInputsTests
{
    [Fact]
    public void Points_run_through_the_grid_with_the_last_axis_fastest()
    {
        SweepInputs inputs = SweepSample.Inputs(null, new SweepAxis("temperature", ["temperature"], [3, 1]), new SweepAxis("h", ["h"], [0, 0.5, 1]));
        Assert.Equal(6, inputs.Count);
        Assert.Equal([3, 0.5], inputs.Coordinates(1).AsEnumerable());
        Assert.Equal([1, 0.0], inputs.Coordinates(3).AsEnumerable());
        ParameterSet last = inputs.At(5).Parameters;
        Assert.Equal((1.0, 1.0, 1.0), (last.Temperature, last["h"], last["Jx"]));
    }

    [Fact]
    public void Axis_of_a_shorthand_sets_all_its_parameters()
    {
        ParameterSet parameters = SweepSample.Inputs(null, new SweepAxis("J", ["Jx", "Jy"], [1, 2])).At(1).Parameters;
        Assert.Equal((2.0, 2.0, 2.5), (parameters["Jx"], parameters["Jy"], parameters.Temperature));
    }

    [Fact]
    public void Temperature_follows_the_other_parameters_where_none_is_given()
    {
        // The critical temperature is proportional to the coupling.
        SweepInputs inputs = SweepSample.Inputs(null, new SweepAxis("J", ["Jx", "Jy"], [1, 2])) with { Temperature = TemperatureRule.Default };
        double one = inputs.At(0).Parameters.Temperature;
        Assert.True(Math.Abs(one - 2.269185314213022) <= 1e-14);
        Assert.True(Math.Abs((inputs.At(1).Parameters.Temperature / one) - 2) <= 1e-14);
        SweepInputs critical = SweepSample.Inputs() with { Temperature = TemperatureRule.Critical };
        Assert.Equal(one, critical.At(0).Parameters.Temperature);
        Assert.Contains("magnetic field", Assert.Throws<ModelException>(() => critical.At(1)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_input_changes_the_identity_of_sweep_and_point()
    {
        SweepInputs plain = SweepSample.Inputs();
        MeasurementInputs m = plain.Measurement;
        SweepInputs[] others =
        [
            plain with { Backend = "plain" },
            plain with { NumericsVersion = 99 },
            plain with { Definition = "text" },
            plain with { Measurement = m with { Quantities = ["ln-z"] } },
            plain with { Measurement = m with { Quantities = ["energy", "ln-z"] } },
            plain with { Measurement = m with { Method = "blocks" } },
            plain with { Measurement = m with { BondDimension = 33 } },
            plain with { Measurement = m with { TorusLength = 8 } },
            plain with { Measurement = m with { Form = NetworkForm.Face } },
            plain with { Measurement = m with { Seed = 2 } },
            plain with { Measurement = m with { Parameters = m.Parameters.With("Jx", 1.5) } },
        ];
        Assert.Equal(others.Length + 1, others.Append(plain).Select(static i => i.Identity).Distinct().Count());
        Assert.Equal(others.Length + 1, others.Append(plain).Select(static i => i.PointIdentity(1)).Distinct().Count());
        Assert.NotEqual(plain, others[0]);
        Assert.Equal(plain, SweepSample.Inputs());
    }

    [Fact]
    public void Point_has_the_identity_of_the_same_measurement_alone()
    {
        SweepInputs grid = SweepSample.Inputs();
        SweepInputs list = SweepSample.Inputs(null, new SweepAxis("h", ["h"], [0.3]));
        Assert.Equal(grid.PointIdentity(3), list.PointIdentity(0));
        Assert.NotEqual(grid.PointIdentity(2), grid.PointIdentity(3));
    }

    /// <summary>The text as the rules say it: sorted members, no spaces, reals with a point.</summary>
    [Fact]
    public void Identity_is_the_hash_of_the_canonical_text()
    {
        const string text = """{"backend":"managed","bondDimension":32,"form":"Auto","method":"boundary","model":"ising","numericsVersion":1,"parameters":{"Jx":1.0,"Jy":1.0,"h":0.1,"temperature":2.5},"quantities":["ln-z","energy"],"seed":1,"torusLength":null}""";
        string expected = Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(System.Text.Encoding.UTF8.GetBytes(text)));
        Assert.Equal(expected, MeasurementJson.Identity(SweepSample.Inputs().At(1), null, "managed", 1));
    }

    [Fact]
    public void Inputs_come_back_from_their_JSON()
    {
        SweepInputs inputs = SweepSample.Inputs("definition\nwith lines", new SweepAxis("J", ["Jx", "Jy"], [0.1, 1e-300, 2])) with { Temperature = TemperatureRule.Default };
        inputs = inputs with { Measurement = inputs.Measurement with { TorusLength = 16, Form = NetworkForm.Row, Seed = -3, Method = "blocks" } };
        JsonObject json = JsonNode.Parse(CanonicalJson.Compact(SweepInputsJson.Write(inputs)))!.AsObject();
        string? seen = null;
        SweepInputs read = SweepInputsJson.Read(json, (name, text) =>
        {
            seen = text;
            return ModelCatalogue.Find(name);
        });
        Assert.Equal(inputs, read);
        Assert.Equal(inputs.Definition, seen);
        Assert.Equal(inputs.At(1).Parameters.Values, read.At(1).Parameters.Values);
        Assert.Equal((16, NetworkForm.Row, -3L, "blocks"), (read.Measurement.TorusLength, read.Measurement.Form, read.Measurement.Seed, read.Measurement.Method));
    }

    [Fact]
    public void Fixed_parameters_that_a_rule_or_an_axis_sets_do_not_enter_the_identity()
    {
        SweepInputs inputs = SweepSample.Inputs() with { Temperature = TemperatureRule.Default };
        SweepInputs other = inputs with { Measurement = inputs.Measurement with { Parameters = inputs.Measurement.Parameters.With("h", 0.7).With("temperature", 9) } };
        Assert.Equal(inputs.Identity, other.Identity);
        Assert.Equal(inputs.At(1).Parameters.Values, other.At(1).Parameters.Values);
    }
}
