namespace TensorRG.Models.Tests;

/// <summary>Random parameters from a seed: the seed in a test's name replays it.</summary>
internal static class RandomParameters
{
    /// <summary>A complete random set of a model, with at most the given number of states.</summary>
    public static ParameterSet Draw(Model model, int seed, int mostStates)
    {
        var random = new Random(seed);
        return model.CreateParameters([.. model.Parameters.Select(p => KeyValuePair.Create(p.Name, Value(p, random, mostStates)))]);
    }

    private static double Value(ParameterDefinition p, Random random, int mostStates) => p switch
    {
        { Name: ParameterDefinition.TemperatureName } => Math.Exp((3 * random.NextDouble()) - 0.7),
        { IsInteger: true } => random.Next((int)p.Minimum, mostStates + 1),
        { Minimum: < 0 } => (3 * random.NextDouble()) - 1.5,
        _ => 0.2 + (2 * random.NextDouble()),
    };
}
