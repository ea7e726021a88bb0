namespace TensorRG.Models.Tests;

/// <summary>Parameters: defaults, look-up, and messages that say what is wrong and what to do.</summary>
public class ParameterTests
{
    private static Model Ising => ModelCatalogue.Find("ising");

    [Fact]
    public void Every_model_describes_itself()
    {
        Assert.Equal(ModelCatalogue.All.Count, ModelCatalogue.All.Select(m => m.Name).Distinct(StringComparer.OrdinalIgnoreCase).Count());
        foreach (Model model in ModelCatalogue.All)
        {
            Assert.Same(model, ModelCatalogue.Find(model.Name.ToUpperInvariant()));
            Assert.All([model.Title, model.Description, model.Lattice, model.Symmetry], text => Assert.False(string.IsNullOrWhiteSpace(text)));
            Assert.All(model.Parameters, p => Assert.True(p.Allows(p.Default), p.Name));
            Assert.All(model.Parameters, p => Assert.All([p.Meaning, p.Unit, p.Symbol, p.RangeText, p.DefaultText], text => Assert.False(string.IsNullOrWhiteSpace(text))));
        }
    }

    [Fact]
    public void Names_are_found_in_any_case_and_by_symbol()
    {
        ParameterSet p = Ising.CreateParameters([new("TEMPERATURE", 2), new("jX", 0.5), new("H", 0.25)]);
        Assert.Equal(2, p.Temperature);
        Assert.Equal(2, p["t"]);
        Assert.Equal(0.5, p["Jx"]);
        Assert.Equal(1, p["Jy"]);
        Assert.Equal(0.25, p["h"]);
        Assert.Equal(["temperature", "Jx", "Jy", "h"], p.Values.Select(v => v.Key));
    }

    [Fact]
    public void J_sets_both_couplings()
    {
        ParameterSet p = Ising.CreateParameters([new("J", -2), new("T", 1)]);
        Assert.Equal((-2, -2), (p["Jx"], p["Jy"]));
        Fails(() => Ising.CreateParameters([new("J", 2), new("Jx", 1)]), "'Jx'", "set twice", "'J'", "Give one");
        Fails(() => Ising.CreateParameters([new("h", 2), new("H", 1)]), "'h'", "set twice");
    }

    [Fact]
    public void A_complete_set_can_be_given_back()
    {
        foreach (Model model in ModelCatalogue.All)
        {
            ParameterSet p = RandomParameters.Draw(model, 11, 9);
            Assert.Equal(p.Values, model.CreateParameters(p.Values).Values);
        }
    }

    [Fact]
    public void With_changes_one_value_and_checks_it()
    {
        ParameterSet p = Ising.CreateParameters();
        Assert.Equal(3, p.With("T", 3).Temperature);
        Assert.Equal(p["Jx"], p.With("T", 3)["Jx"]);
        Fails(() => p.With("T", -3), "temperature", "-3");
        Fails(() => p.With("z", 1), "no parameter 'z'");
    }

    [Fact]
    public void Unknown_names_are_answered_with_the_known_ones()
    {
        Fails(() => ModelCatalogue.Find("isingg"), "no model 'isingg'", "Did you mean 'ising'?", "ashkin-teller, clock, dimers, dimers-honeycomb");
        Fails(() => Ising.CreateParameters([new("temprature", 1)]), "no parameter 'temprature'", "Did you mean 'temperature'?", "temperature, Jx, Jy, h, J");
        ModelException far = Assert.Throws<ModelException>(() => Ising.CreateParameters([new("chemicalpotential", 1)]));
        Assert.DoesNotContain("Did you mean", far.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("ising", "temperature", double.NaN, "not a number")]
    [InlineData("ising", "temperature", 0, "must be a number from")]
    [InlineData("ising", "temperature", -1, "is -1")]
    [InlineData("ising", "temperature", double.PositiveInfinity, "must be a number from")]
    [InlineData("ising", "J", double.NegativeInfinity, "must be a number from")]
    [InlineData("potts", "q", 2.5, "a whole number from 2 to 64")]
    [InlineData("potts", "q", 1, "a whole number from 2 to 64")]
    [InlineData("clock", "q", 65, "a whole number from 2 to 64")]
    [InlineData("six-vertex", "c", -1, "must be a number from")]
    [InlineData("six-vertex", "a", 0, "must be a number from")]
    public void Values_out_of_range_are_refused(string model, string parameter, double value, string says)
        => Fails(() => ModelCatalogue.Find(model).CreateParameters([new(parameter, value)]), model, says);

    [Fact]
    public void The_temperature_defaults_to_the_critical_one_where_it_is_known()
    {
        Assert.Equal(ReferenceValues.Get("ising-square-tc"), Ising.CreateParameters().Temperature);
        Near.Check(3 * ReferenceValues.Get("ising-square-tc"), Ising.CreateParameters([new("J", 3)]).Temperature, 1e-15, "J = 3");
        Assert.Equal(Ising.Parameters[0].Default, Ising.CreateParameters([new("J", 3), new("h", 1)]).Temperature);
        Near.Check(ReferenceValues.Get("potts10-tc"), ModelCatalogue.Find("potts").CreateParameters([new("q", 10)]).Temperature, 1e-15, "q = 10");
        Assert.Equal(1, ModelCatalogue.Find("clock").CreateParameters([new("q", 6)]).Temperature);
        Assert.Equal(Ising.Parameters[0].Default, Ising.CreateParameters([new("J", 1e-12)]).Temperature);
    }

    [Theory]
    [InlineData("ising", "h", 0.5, "field")]
    [InlineData("ising", "Jx", 0, "chains")]
    [InlineData("potts", "J", -1, "antiferromagnetic")]
    [InlineData("potts", "J", 0, "independent")]
    [InlineData("clock", "q", 5, "Kosterlitz-Thouless")]
    [InlineData("six-vertex", "c", 2, "no temperature")]
    public void Where_there_is_no_critical_temperature_the_message_says_why(string name, string parameter, double value, string says)
    {
        Model model = ModelCatalogue.Find(name);
        ParameterSet p = model.CreateParameters([new(parameter, value)]);
        Assert.Null(model.CriticalTemperature(p).Temperature);
        Fails(() => model.AtCriticalTemperature(p), name, "no exact critical temperature", says, "Give ");
    }

    [Fact]
    public void The_critical_temperature_can_be_asked_for()
    {
        ParameterSet p = Ising.CreateParameters([new("T", 7), new("J", -1)]);
        Assert.Equal(ReferenceValues.Get("ising-square-tc"), Ising.AtCriticalTemperature(p).Temperature);
    }

    [Fact]
    public void Parameters_of_another_model_are_refused()
        => Assert.Throws<ArgumentException>(() => Ising.Network(ModelCatalogue.Find("potts").CreateParameters()));

    private static void Fails(Action action, params string[] says)
    {
        ModelException e = Assert.Throws<ModelException>(action);
        Assert.All(says, text => Assert.Contains(text, e.Message, StringComparison.Ordinal));
    }
}
