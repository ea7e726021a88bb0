using TensorRG.Models.Lattices;

namespace TensorRG.Cli.Input;

/// <summary>The forms of a network as words of the command line.</summary>
internal static class NetworkForms
{
    public static string[] Names { get; } = [.. Enum.GetValues<NetworkForm>().Select(Name)];

    public static string Name(NetworkForm form) => form.ToString().ToLowerInvariant();

    public static NetworkForm Read(string name) => Enum.Parse<NetworkForm>(name, ignoreCase: true);
}
