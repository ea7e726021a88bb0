using TensorRG.Models.Solutions;

namespace TensorRG.Models.Tests.Solutions;

/// <summary>Asks an exact solution by name.</summary>
internal static class Ask
{
    public static double Value(string solution, string quantity, params (string Name, double Value)[] parameters)
        => Exact(solution, quantity, parameters)?.Value ?? double.NaN;

    public static ExactValue? Exact(string solution, string quantity, params (string Name, double Value)[] parameters)
        => KnownSolutions.Find(solution)!.Exact(quantity, Set(parameters));

    public static CriticalPoint Critical(string solution, params (string Name, double Value)[] parameters)
        => KnownSolutions.Find(solution)!.CriticalTemperature(Set(parameters));

    public static ParameterSet Set(params (string Name, double Value)[] parameters)
        => new SolutionModel([.. parameters.Select(p => p.Name)]).CreateParameters(parameters.Select(p => KeyValuePair.Create(p.Name, p.Value)));
}
