using System.CommandLine;
using System.Text.Json.Nodes;
using Spectre.Console;
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
        var command = new Command("models", "List the models, or explain one: parameters, symmetry, exact references.");
        Argument<string?> name = TextInput.Optional("name", "Name of a model.");
        Option<bool> json = new("--json") { Description = "Print one JSON object and nothing else." };
        command.Arguments.Add(name);
        command.Options.Add(json);
        command.SetAction(result =>
        {
            IReadOnlyList<Model> models = result.GetValue(name) is { } one ? [ModelCatalogue.Find(one)] : ModelCatalogue.All;
            if (result.GetValue(json))
                Console.Out.Write(JsonText.Write(JsonText.Ordered(("models", new JsonArray([.. models.Select(ModelJson)])))));
            else if (result.GetValue(name) is null)
                List(models);
            else
                Explain(models[0]);
            return ExitCode.Done;
        });
        return command;
    }

    private static void List(IReadOnlyList<Model> models)
    {
        var grid = new Grid().AddColumn(new GridColumn().NoWrap().PadRight(3)).AddColumn(new GridColumn().NoWrap().PadRight(3)).AddColumn();
        foreach (Model model in models)
            grid.AddRow(new Text(model.Name), new Text(model.Title), new Text(string.Join(", ", model.Parameters.Select(static p => p.Name))));
        Consoles.Out.Write(grid);
        Consoles.Out.WriteLine("Explain one with: tensorrg models NAME");
    }

    private static void Explain(Model model)
    {
        IAnsiConsole console = Consoles.Out;
        console.WriteLine(model.Title);
        console.WriteLine();
        console.Write(new Text(model.Description + "\n\n"));
        var facts = new Grid().AddColumn(new GridColumn().NoWrap().PadRight(3)).AddColumn();
        facts.AddRow(new Text("lattice"), new Text(FormattableString.Invariant($"{model.Lattice}, {model.SitesPerVertex} site(s) per network vertex")));
        facts.AddRow(new Text("symmetry"), new Text(model.Symmetry));
        console.Write(facts);
        console.WriteLine();
        TableView.Write(console, ParameterTable(model));
        foreach (ParameterShorthand shorthand in model.Shorthands)
            console.WriteLine($"{shorthand.Name} sets {string.Join(" and ", shorthand.Targets)}: {shorthand.Meaning}");
        console.WriteLine("Exact references");
        TableView.Write(console, ReferenceTable(model));
    }

    private static DataTable ParameterTable(Model model)
    {
        var table = new DataTable(
            new Reports.TableColumn("name", ColumnKind.Text) { Title = "parameter" },
            new Reports.TableColumn("symbol", ColumnKind.Text),
            new Reports.TableColumn("default", ColumnKind.Text),
            new Reports.TableColumn("unit", ColumnKind.Text),
            new Reports.TableColumn("range", ColumnKind.Text),
            new Reports.TableColumn("meaning", ColumnKind.Text));
        foreach (ParameterDefinition p in model.Parameters)
            table.AddRow(p.Name, p.Symbol, p.DefaultText, p.Unit, p.RangeText, p.Meaning);
        return table;
    }

    private static DataTable ReferenceTable(Model model)
    {
        var table = new DataTable(
            new Reports.TableColumn("quantity", ColumnKind.Text),
            new Reports.TableColumn("validity", ColumnKind.Text) { Title = "where" },
            new Reports.TableColumn("source", ColumnKind.Text));
        foreach (ExactReference reference in model.ExactReferences)
            table.AddRow(QuantityNames.Words(reference.Quantity), reference.Validity, reference.Source);
        return table;
    }

    private static JsonObject ModelJson(Model model) => JsonText.Ordered(
        ("name", model.Name),
        ("title", model.Title),
        ("description", model.Description),
        ("lattice", model.Lattice),
        ("sitesPerVertex", model.SitesPerVertex),
        ("symmetry", model.Symmetry),
        ("parameters", ParameterTable(model).ToJson()),
        ("exactReferences", ReferenceTable(model).ToJson()));
}
