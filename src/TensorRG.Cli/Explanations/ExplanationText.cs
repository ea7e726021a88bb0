using System.Collections.Immutable;
using TensorRG.Cli.Input;
using TensorRG.Cli.Output;
using TensorRG.Models;
using TensorRG.Models.Lattices;

namespace TensorRG.Cli.Explanations;

/// <summary>An explained model as text.</summary>
internal static class ExplanationText
{
    private const int MostStates = 16;
    private const int MostCharges = 12;

    public static string Of(ModelExplanation explanation)
    {
        Model model = explanation.Model;
        var page = new Page();
        page.Paragraphs($"{model.Name}: {model.Title}");
        page.Line();
        page.Paragraphs(model.Description);
        if (model.Description.Length > 0)
            page.Line();
        Facts(page, explanation);
        Weights(page, explanation);
        Parameters(page, explanation);
        Observables(page, explanation);
        References(page, explanation);
        Usage(page, explanation.Source);
        return page.ToString();
    }

    private static void Facts(Page page, ModelExplanation explanation)
    {
        NetworkPlan plan = explanation.Plan;
        ImmutableArray<string> labels = explanation.System.StateLabels;
        bool isIntegral = explanation.System.LogMeasure.Any(static m => m != 0);
        page.Fact("lattice", FormattableString.Invariant($"{explanation.Model.Lattice}, {plan.SitesPerVertex} {(plan.SitesPerVertex == 1 ? "site" : "sites")} per tensor"));
        page.Fact("states", FormattableString.Invariant($"{labels.Length} of {(explanation.System.OnEdges ? "an edge" : "a site")}{(isIntegral ? ", nodes of an integral" : "")}: {string.Join("; ", labels.Take(MostStates))}{(labels.Length > MostStates ? "; ..." : "")}"));
        page.Fact("constraints", Constraints(explanation.Terms));
        page.Fact("symmetry", plan.Symmetry);
        page.Fact("network", plan.Choice + (plan.IsFromSolution ? " Elements from formulas of the exact solution." : ""));
        page.Fact("other forms", plan.Others.IsEmpty ? "none" : string.Join(", ", plan.Others.Select(static f => "--form " + NetworkForms.Name(f))));
        page.Fact("tensor", FormattableString.Invariant($"{plan.VerticalBond.Length} x {plan.HorizontalBond.Length} x {plan.VerticalBond.Length} x {plan.HorizontalBond.Length} (up, left, down, right), {(plan.IsReal ? "real" : "complex")}"));
        string vertical = Bond(plan.VerticalBond), horizontal = Bond(plan.HorizontalBond);
        page.Fact("", vertical == horizontal ? "both bonds: " + vertical : $"vertical bond: {vertical}; horizontal bond: {horizontal}");
        page.Line();
    }

    private static string Constraints(ImmutableArray<TermView> terms)
    {
        string[] found = [.. terms.Where(static t => t.Excluded > 0).Select(static t => FormattableString.Invariant($"{t.Where}: {t.Excluded} of {t.Values.Length} configurations excluded")).Distinct()];
        return found.Length == 0 ? "none" : string.Join("; ", found);
    }

    private static string Bond(ImmutableArray<BondState> bond)
    {
        string dimension = FormattableString.Invariant($"{bond.Length} {(bond.Length == 1 ? "state" : "states")}");
        if (bond[0].Charge.IsEmpty)
            return dimension + " without charge";
        IReadOnlyList<(ImmutableArray<int> Charge, int States)> charges = ModelExplanation.Charges(bond);
        int least = charges.Min(static c => c.States), most = charges.Max(static c => c.States);
        string listed = charges.Count <= MostCharges
            ? string.Join(" ", charges.Select(static c => c.Charge.Length == 1 ? FormattableString.Invariant($"{c.Charge[0]}") : $"({string.Join(',', c.Charge)})"))
            : FormattableString.Invariant($"{charges.Count} different");
        return least == most
            ? FormattableString.Invariant($"{dimension}, {least} of each charge: {listed}")
            : FormattableString.Invariant($"{dimension}, charges {listed}: {string.Join(" ", charges.Select(static c => c.States))} of each");
    }

    private static void Weights(Page page, ModelExplanation explanation)
    {
        bool hasEnergy = explanation.Terms.Any(static t => t.Kind == TermKind.Energy);
        string excluded = explanation.Terms.Any(static t => t.Excluded > 0) ? "; x: excluded" : "";
        page.Paragraphs($"{(hasEnergy ? "Energies, weight exp(-E/T)" : "Weights")} at {ModelLine.Parameters(explanation.Parameters)}{excluded}");
        foreach (TermView term in explanation.Terms)
            TermText.Write(page, term, explanation.System.StateLabels);
        if (explanation.Terms.IsEmpty)
            page.Item("1 for all states");
        page.Line();
    }

    private static void Parameters(Page page, ModelExplanation explanation)
    {
        Model model = explanation.Model;
        page.Line("Parameters, set with --set NAME=VALUE" + (model.HasTemperature ? " and --temperature T" : ""));
        page.Table(["name", "value", "default", "range", "meaning"], model.Parameters.Zip(explanation.Parameters.Values, static (p, v) => (string[])
        [
            p.Name == p.Symbol ? p.Name : $"{p.Name}, {p.Symbol}",
            ComplexText.Of(v.Value),
            p.DefaultsToCritical ? $"critical, else {ComplexText.Of(p.Default)}" : ComplexText.Of(p.Default),
            p.RangeText.Replace("a whole number from", "whole,", StringComparison.Ordinal).Replace("a number from ", "", StringComparison.Ordinal),
            p.Meaning + Unit(p.Unit),
        ]));
        foreach (ParameterShorthand shorthand in model.Shorthands)
            page.Item($"{shorthand.Name} sets {string.Join(" and ", shorthand.Targets)} at once");
        if (model.HasTemperature)
            page.Item(Critical(model.CriticalTemperature(explanation.Parameters)));
        page.Line();
    }

    private static string Critical(CriticalPoint point) => point.Temperature is { } known
        ? $"Critical temperature at these parameters: {Reports.NumberFormat.RoundTrip(known.Value)} ({known.Source})"
        : $"No critical temperature is known exactly at these parameters: {point.Reason}.";

    private static void Observables(Page page, ModelExplanation explanation)
    {
        page.Line("Observables, measured by tensorrg measure");
        LocalObservable[] observables = [.. explanation.Observables];
        if (observables.Length > 0)
            page.Table(["name", "kind", "meaning"], observables.Select(o => (string[])[o.Name, Kind(o, explanation.Breaks(o)), o.Meaning + Unit(o.Unit)]));
        string[] further = [.. explanation.Quantities.Except(observables.Select(static o => o.Name)), .. observables.Any(static o => o.IsOrderParameter) ? (string[])["susceptibility"] : []];
        page.Item($"{(observables.Length > 0 ? "and " : "")}{string.Join(", ", further)}");
        page.Line();
    }

    private static string Kind(LocalObservable observable, bool? breaks)
    {
        var words = new List<string>();
        if (observable.IsOrderParameter)
            words.Add("order parameter");
        if (breaks == true)
            words.Add("breaks the symmetry");
        if (observable.IsStaggered)
            words.Add("alternates in sign");
        return string.Join(", ", words);
    }

    private static void References(Page page, ModelExplanation explanation)
    {
        page.Line("Exact references");
        if (explanation.Model.ExactReferences.Count == 0)
            page.Item("none");
        else
            page.Table(["quantity", "value here", "where, and by whom"], explanation.Model.ExactReferences.Select(r => (string[])[QuantityNames.Words(r.Quantity), Value(explanation, r.Quantity), $"{r.Validity}: {r.Source}"]));
        page.Line();
    }

    private static string Value(ModelExplanation explanation, string quantity)
        => explanation.Model.Exact(quantity, explanation.Parameters) is { } exact ? Reports.NumberFormat.RoundTrip(exact.Value) : "-";

    private static void Usage(Page page, string source)
    {
        page.Line("Use");
        page.Table(
            ["command", "what it gives"],
            [
                [$"tensorrg run {source}", "ln Z per site from coarse-graining, step by step"],
                [$"tensorrg measure {source}", "all quantities above, each with its error bar"],
                [$"tensorrg models {source} --file > mine.toml", "the model file, to start your own from: tensorrg run mine.toml"],
            ]);
    }

    private static string Unit(string unit) => unit.StartsWith("none", StringComparison.Ordinal) || unit.Length == 0 ? "" : $" [{unit}]";
}
