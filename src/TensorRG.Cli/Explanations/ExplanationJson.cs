using System.Collections.Immutable;
using System.Numerics;
using System.Text.Json.Nodes;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Models;
using TensorRG.Models.Lattices;
using TensorRG.Reports;

namespace TensorRG.Cli.Explanations;

/// <summary>An explained model as JSON.</summary>
internal static class ExplanationJson
{
    // Larger tables are summed up, as in the text.
    private const int MostValues = 4096;

    public static JsonObject Of(ModelExplanation explanation)
    {
        Model model = explanation.Model;
        return JsonText.Ordered(
            ("name", model.Name),
            ("title", model.Title),
            ("description", model.Description),
            ("lattice", model.Lattice),
            ("sitesPerVertex", explanation.Plan.SitesPerVertex),
            ("parameters", Definitions(model)),
            ("values", SummaryJson.Parameters(explanation.Parameters)),
            ("criticalTemperature", model.HasTemperature && model.CriticalTemperature(explanation.Parameters).Temperature is { } critical ? JsonText.Number(critical.Value) : null),
            ("states", Texts(explanation.System.StateLabels)),
            ("terms", new JsonArray([.. explanation.Terms.Select(Term)])),
            ("symmetry", explanation.Plan.Symmetry),
            ("network", Network(explanation.Plan)),
            ("observables", new JsonArray([.. explanation.Observables.Select(o => Observable(o, explanation.Breaks(o)))])),
            ("quantities", Texts(explanation.Quantities)),
            ("exactReferences", new JsonArray([.. model.ExactReferences.Select(r => Reference(r, explanation.Parameters))])));
    }

    /// <summary>The parameters of a model, without values.</summary>
    public static JsonArray Definitions(Model model) => [.. model.Parameters.Select(static p => JsonText.Ordered(
        ("name", p.Name),
        ("symbol", p.Symbol),
        ("default", JsonText.Number(p.Default)),
        ("defaultsToCritical", p.DefaultsToCritical),
        ("minimum", JsonText.Number(p.Minimum)),
        ("maximum", JsonText.Number(p.Maximum)),
        ("whole", p.IsInteger),
        ("unit", p.Unit),
        ("meaning", p.Meaning)))];

    private static JsonArray Texts(IEnumerable<string> texts) => [.. texts.Select(static t => JsonValue.Create(t))];

    private static JsonObject Term(TermView term) => JsonText.Ordered(
        ("where", term.Where),
        ("kind", term.Kind.ToString().ToLowerInvariant()),
        ("variables", Texts(term.Variables)),
        ("configurations", term.Values.Length),
        ("excluded", term.Excluded),
        ("distinct", term.Distinct),
        ("smallest", JsonText.Number(term.Range.Least)),
        ("largest", JsonText.Number(term.Range.Most)),
        ("values", term.Values.Length > MostValues ? null : new JsonArray([.. term.Values.Select(static v => v is { } x ? Value(x) : null)])));

    private static JsonNode? Value(Complex value) => value.Imaginary == 0
        ? JsonText.Number(value.Real)
        : JsonText.Ordered(("re", JsonText.Number(value.Real)), ("im", JsonText.Number(value.Imaginary)));

    private static JsonObject Network(NetworkPlan plan) => JsonText.Ordered(
        ("form", NetworkForms.Name(plan.Form)),
        ("choice", plan.Choice),
        ("otherForms", Texts(plan.Others.Select(NetworkForms.Name))),
        ("fromExactSolution", plan.IsFromSolution),
        ("real", plan.IsReal),
        ("groupOrders", new JsonArray([.. plan.GroupOrders.Select(static n => JsonValue.Create(n))])),
        ("verticalBond", Bond(plan.VerticalBond)),
        ("horizontalBond", Bond(plan.HorizontalBond)));

    private static JsonObject Bond(ImmutableArray<BondState> bond) => JsonText.Ordered(
        ("dimension", bond.Length),
        ("charges", new JsonArray([.. ModelExplanation.Charges(bond).Select(static c => JsonText.Ordered(
            ("charge", new JsonArray([.. c.Charge.Select(static n => JsonValue.Create(n))])),
            ("states", c.States)))])));

    private static JsonObject Observable(LocalObservable observable, bool? breaks) => JsonText.Ordered(
        ("name", observable.Name),
        ("meaning", observable.Meaning),
        ("unit", observable.Unit),
        ("orderParameter", observable.IsOrderParameter),
        ("staggered", observable.IsStaggered),
        ("breaksSymmetry", breaks));

    private static JsonObject Reference(ExactReference reference, ParameterSet parameters) => JsonText.Ordered(
        ("quantity", reference.Quantity),
        ("value", parameters.Model.Exact(reference.Quantity, parameters) is { } exact ? JsonText.Number(exact.Value) : null),
        ("validity", reference.Validity),
        ("source", reference.Source));
}
