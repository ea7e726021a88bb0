using System.Globalization;
using TensorRG.CoarseGraining;
using TensorRG.Models;
using TensorRG.Runs;
using TensorRG.Tensors.Decompositions;

namespace TensorRG.Cli.Input;

/// <summary>A checked request to coarse-grain a model.</summary>
internal sealed record FlowRequest
{
    private const double BondExponentDefault = -0.5;

    public required ParameterSet Parameters { get; init; }

    public required SchemeDefinition Scheme { get; init; }

    public double BondExponent { get; init; } = BondExponentDefault;

    public int Steps { get; init; }

    public bool CutsAnywhere { get; init; }

    public bool IsGraded { get; init; }

    public DecompositionMode Decomposition { get; init; }

    public long Seed { get; init; }

    public int Threads { get; init; }

    public string Backend { get; init; } = "";

    /// <summary>Checks what was given as text.</summary>
    /// <exception cref="UsageException">Contradictory or unreadable options.</exception>
    /// <exception cref="ModelException">Unknown model or parameter, or a value that is not allowed.</exception>
    public static FlowRequest Create(string modelName, string? temperature, string[] settings, string schemeName, double? bondExponent)
    {
        Model model = ModelCatalogue.Find(modelName);
        SchemeDefinition scheme = SchemeRegistry.Find(schemeName)!;
        if (bondExponent is not null && !scheme.UsesBondExponent)
            throw new UsageException($"--bond-exponent has no meaning for the scheme '{scheme.Name}'. Leave it out, or choose --scheme bond-weighted.");
        return new FlowRequest
        {
            Parameters = ReadParameters(model, temperature, settings),
            Scheme = scheme,
            BondExponent = bondExponent ?? BondExponentDefault,
        };
    }

    /// <summary>The inputs of the run at one bond dimension.</summary>
    public RunInputs Inputs(int bondDimension)
    {
        var cut = new CutRule(bondDimension, CutsAnywhere ? 0 : CutRule.DefaultMultipletGap);
        var settings = new SchemeSettings(cut) { BondExponent = BondExponent, Decomposition = Decomposition, Seed = Seed };
        return FlowFactory.Describe(Parameters, Scheme, settings, Steps, IsGraded, Backend);
    }

    private static ParameterSet ReadParameters(Model model, string? temperature, string[] settings)
    {
        List<KeyValuePair<string, double>> given = [.. settings.Select(ReadSetting)];
        if (temperature is null)
            return model.CreateParameters(given);
        if (!model.HasTemperature)
            throw new UsageException($"The model '{model.Name}' is given by weights and has no temperature. Leave out --temperature; its parameters are {string.Join(", ", model.Parameters.Select(static p => p.Name))}.");
        if (!string.Equals(temperature, "critical", StringComparison.OrdinalIgnoreCase))
        {
            given.Add(KeyValuePair.Create(ParameterDefinition.TemperatureName, ReadNumber("--temperature", temperature)));
            return model.CreateParameters(given);
        }

        ParameterDefinition definition = model.Parameters.First(static p => p.Name == ParameterDefinition.TemperatureName);
        if (given.Any(g => definition.IsCalled(g.Key)))
            throw new UsageException("The temperature is set twice, by --temperature critical and by --set. Give one of them.");
        return model.AtCriticalTemperature(model.CreateParameters(given));
    }

    private static KeyValuePair<string, double> ReadSetting(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0)
            throw new UsageException($"--set takes NAME=VALUE, such as --set h=0.1, not '{text}'.");
        string name = text[..equals].Trim();
        return KeyValuePair.Create(name, ReadNumber($"--set {name}", text[(equals + 1)..]));
    }

    private static double ReadNumber(string option, string text)
    {
        if (double.TryParse(text.Trim(), NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value))
            return value;
        string hint = option == "--temperature" ? " or the word critical" : "";
        throw new UsageException($"{option} takes a finite number, such as 2.5{hint}, not '{text}'. Use a point, not a comma, for decimals.");
    }
}
