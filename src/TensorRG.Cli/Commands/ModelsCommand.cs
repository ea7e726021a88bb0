using System.CommandLine;
using System.Text.Json.Nodes;
using TensorRG.Cli.Explanations;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Models;
using TensorRG.Reports;

namespace TensorRG.Cli.Commands;

/// <summary><c>tensorrg models</c>: what can be computed.</summary>
internal static class ModelsCommand
{
    public static Command Create()
    {
        var command = new Command("models", "List the models, or explain one: states, energies, symmetry, network, parameters, observables, exact references.");
        Argument<string?> name = TextInput.Optional("name", ModelSource.Help + " None: the list.");
        var options = new ModelOptions();
        Option<string> form = ChoiceOption.OneOf("--form", "Form of the network to explain.", "auto", NetworkForms.Names);
        Option<bool> file = new("--file") { Description = "Print the text of the model file and nothing else: a start for your own." };
        Option<bool> json = new("--json") { Description = "Print one JSON object and nothing else." };
        command.Arguments.Add(name);
        foreach (Option option in (Option[])[options.Temperature, options.Set, form, file, json])
            command.Options.Add(option);
        command.SetAction(result =>
        {
            Refuse(result, result.GetValue(name), [options.Temperature, options.Set, form, file], file, json);
            Console.Out.Write(result.GetValue(name) switch
            {
                null => List(result.GetValue(json)),
                { } one when result.GetValue(file) => ModelSource.Find(one).Definition,
                { } one => Explain(
                    ModelExplanation.Of(one, options.Read(result, one).Parameters(), NetworkForms.Read(result.GetRequiredValue(form))), result.GetValue(json)),
            });
            return ExitCode.Done;
        });
        return command;
    }

    private static void Refuse(ParseResult result, string? name, Option[] ofOne, Option file, Option json)
    {
        if (name is null && ofOne.FirstOrDefault(o => IsGiven(result, o)) is { } given)
            throw new UsageException($"{given.Name} goes with one model. Name it: tensorrg models NAME {given.Name}");
        if (!IsGiven(result, file))
            return;
        if (ofOne.Append(json).FirstOrDefault(o => o != file && IsGiven(result, o)) is { } other)
            throw new UsageException($"--file prints the text of the model file alone, and {other.Name} has no say in it. Give one of them.");
    }

    private static bool IsGiven(ParseResult result, Option option) => result.GetResult(option) is { Implicit: false };

    private static string List(bool json)
    {
        IReadOnlyList<Model> models = ModelCatalogue.All;
        if (json)
            return JsonText.Write(JsonText.Ordered(("models", new JsonArray([.. models.Select(static m => JsonText.Ordered(("name", m.Name), ("title", m.Title), ("parameters", ExplanationJson.Definitions(m))))]))));
        var page = new Page();
        page.Table(["name", "parameters", "title"], models.Select(static m => (string[])[m.Name, string.Join(", ", m.Parameters.Select(static p => p.Symbol)), m.Title]));
        page.Line();
        page.Line("Explain one with: tensorrg models NAME");
        page.Line("A model of your own: tensorrg models ising --file > mine.toml, edit it, tensorrg run mine.toml");
        return page.ToString();
    }

    private static string Explain(ModelExplanation explanation, bool json)
        => json ? JsonText.Write(ExplanationJson.Of(explanation)) : ExplanationText.Of(explanation);
}
