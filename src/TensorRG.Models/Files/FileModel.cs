using System.Numerics;
using TensorRG.Models.Files.Expressions;
using TensorRG.Models.Lattices;

namespace TensorRG.Models.Files;

/// <summary>A model that a file describes. Made by <see cref="ModelFile"/>; its tables are known to be right at the default parameters.</summary>
public sealed class FileModel : Model
{
    private readonly ModelContent content;
    private readonly Lazy<string> symmetry;

    /// <param name="source">The text.</param>
    /// <param name="isChecked">True for a file that is known to be right: its tables are not filled before they are needed.</param>
    internal FileModel(SourceText source, bool isChecked = false)
    {
        content = ContentReader.Read(source);
        Definition = source.Text;
        symmetry = new(() => Plan(CreateParameters()).Symmetry);
        Parameters = [.. content.Globals.Parameters.SelectMany(p => p.Definitions)];
        Shorthands =
        [
            .. content.Globals.Parameters.Where(p => p.Shorthand is not null)
                .GroupBy(p => p.Shorthand!, p => p.Definitions[0].Name, StringComparer.OrdinalIgnoreCase)
                .Select(g => new ParameterShorthand(g.Key, [.. g], $"Sets {string.Join(" and ", g)} to the same value")),
        ];
        ExactReferences =
        [
            .. content.Solution?.References ?? [],
            .. content.References.Select(r => new ExactReference(r.Quantity, r.Validity, r.Source)),
        ];
        if (!isChecked)
            CheckSolution();
        if (HasTemperature && (content.Critical is not null || content.Solution is not null))
            Parameters = [.. Parameters.Select(p => p.Name == ParameterDefinition.TemperatureName ? p with { DefaultsToCritical = true } : p)];
        if (!isChecked)
            SystemBuilder.Build(content, CreateParameters());
    }

    /// <inheritdoc/>
    public override string Name => content.Name;

    /// <inheritdoc/>
    public override string Title => content.Title;

    /// <inheritdoc/>
    public override string Description => content.Description;

    /// <inheritdoc/>
    public override string Lattice => content.Lattice.ToString().ToLowerInvariant() + (content.OnEdges ? " (variables on the edges)" : "");

    /// <inheritdoc/>
    public override int SitesPerVertex => content.Lattice switch
    {
        LatticeKind.Honeycomb => 2,
        LatticeKind.Kagome => 3,
        _ => 1,
    };

    /// <summary>The symmetry that the network's charges carry at the default parameters, in words.</summary>
    public override string Symmetry => symmetry.Value;

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterDefinition> Parameters { get; }

    /// <inheritdoc/>
    public override IReadOnlyList<ParameterShorthand> Shorthands { get; }

    /// <inheritdoc/>
    public override IReadOnlyList<ExactReference> ExactReferences { get; }

    /// <summary>The text of the file.</summary>
    public override string Definition { get; }

    /// <summary>Form of the network that the file asks for.</summary>
    public NetworkForm Form => content.Form;

    /// <summary>As for any model; a complex parameter takes a complex number such as 0.2+0.1i and sets both its parts.</summary>
    /// <inheritdoc/>
    public override IEnumerable<KeyValuePair<string, double>> Settings(string name, string text)
    {
        FileParameter? parameter = content.Globals.Parameters.FirstOrDefault(p => p.IsComplex && string.Equals(p.Name, name, StringComparison.OrdinalIgnoreCase));
        if (parameter is null)
            return base.Settings(name, text);
        Complex value = ComplexNumber(name, text);
        return [new(parameter.Definitions[0].Name, value.Real), new(parameter.Definitions[1].Name, value.Imaginary)];
    }

    /// <inheritdoc/>
    protected override CriticalPoint FindCriticalTemperature(ParameterSet parameters)
    {
        if (!HasTemperature)
            return CriticalPoint.None("the model is given by weights and has no temperature");
        CriticalPoint? own = content.Critical?.At(new(content.Globals, parameters));
        return own?.Temperature is not null || content.Solution is null
            ? own ?? CriticalPoint.None("the model file gives none")
            : content.Solution.CriticalTemperature(parameters);
    }

    /// <inheritdoc/>
    protected override VertexNetwork BuildNetwork(ParameterSet parameters)
        => content.Solution?.Network(parameters) ?? Builder(parameters).Network;

    /// <inheritdoc/>
    protected override LatticeSystem? DescribeSystem(ParameterSet parameters) => SystemBuilder.Build(content, parameters);

    /// <inheritdoc/>
    protected override ExactValue? FindExact(string quantity, ParameterSet parameters)
    {
        if (content.Solution?.Exact(quantity, parameters) is { } solved)
            return solved;
        Workspace work = new(content.Globals, parameters);
        return content.References.Where(r => r.Quantity == quantity).Select(r => r.At(work)).FirstOrDefault(v => v is not null);
    }

    /// <inheritdoc/>
    protected override NetworkPlan FindPlan(ParameterSet parameters, NetworkForm form)
    {
        NetworkPlan plan = NetworkBuilder.Plan(SystemBuilder.Build(content, parameters), form == NetworkForm.Auto ? content.Form : form);
        if (form != NetworkForm.Auto)
            return plan;
        if (content.Form != NetworkForm.Auto)
            plan = plan with { Choice = $"The model file asks for the {content.Form.ToString().ToLowerInvariant()} form." };
        return content.Solution?.Network(parameters) is { } own ? Of(own, plan) : plan;
    }

    // Made by hand, the network may leave out part of the symmetry that tables show.
    private static NetworkPlan Of(VertexNetwork own, NetworkPlan plan) => plan with
    {
        Symmetry = own.GroupOrders.SequenceEqual(plan.GroupOrders) ? plan.Symmetry : own.GroupOrders.IsEmpty ? "none" : string.Join("; ", own.GroupOrders.Select(n => n == 0 ? "U(1)" : FormattableString.Invariant($"Z{n}"))),
        GroupOrders = own.GroupOrders,
        VerticalBond = own.VerticalBond,
        HorizontalBond = own.HorizontalBond,
        IsReal = own.IsReal,
        IsFromSolution = true,
    };

    private ModelNetwork Builder(ParameterSet parameters)
        => NetworkBuilder.Build(SystemBuilder.Build(content, parameters), new NetworkOptions { Form = content.Form });

    // A solution looks its parameters up by name: a file that lacks one is found out here.
    private void CheckSolution()
    {
        try
        {
            content.Solution?.CriticalTemperature(CreateParameters());
            content.Solution?.Exact(QuantityNames.Name(Quantity.LogZPerSite), CreateParameters());
        }
        catch (ModelException e)
        {
            throw content.Root.Find("solution")!.Value.Error($"The solution does not fit this file: {e.Message} Declare what it needs in [parameters], or remove the key.");
        }
    }

    private static Complex ComplexNumber(string name, string text)
    {
        try
        {
            TextSpot spot = new(new SourceText(name, text), 0, true);
            return Expression.Parse(text, spot, Scope.Empty, ExpressionType.Number).Number([]);
        }
        catch (ModelFileException)
        {
            throw new ModelException($"Parameter '{name}' is set to {SourceText.Quote(text)}, which is no complex number. Give one, such as 0.2+0.1i.");
        }
    }
}
