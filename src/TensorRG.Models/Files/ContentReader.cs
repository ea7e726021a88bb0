using System.Collections.Immutable;
using TensorRG.Models.Files.Expressions;
using TensorRG.Models.Lattices;
using TensorRG.Models.Solutions;

namespace TensorRG.Models.Files;

/// <summary>Reads a whole model file.</summary>
internal sealed class ContentReader
{
    private static readonly string[] SiteTables = ["site", "energy", "weight", "require"];
    private static readonly Dictionary<string, LatticeKind> Lattices = Enum.GetValues<LatticeKind>().ToDictionary(Lower);
    private static readonly Dictionary<string, NetworkForm> Forms = Enum.GetValues<NetworkForm>().ToDictionary(Lower);

    private readonly TableReader top;
    private readonly LatticeKind lattice;
    private readonly NameRegistry names;
    private readonly Globals globals;

    private ContentReader(SourceText source)
    {
        Node root = NodeReader.Read(source);
        top = new(root, "the top level of the file");
        top.Allow("name", "title", "description", "lattice", "solution", "parameters", "constants", "site", "energy", "weight", "require", "vertex", "observables", "network", "critical", "reference");
        lattice = Choice("lattice", top.RequiredText("lattice", "\"square\""), top, Lattices);
        names = new(source);
        ImmutableArray<FileParameter> parameters = ParameterReader.Read(top.Find("parameters"), names);
        globals = Globals.Read(parameters, top.Find("constants"), names);
    }

    /// <summary>What the file says.</summary>
    /// <param name="source">The file.</param>
    /// <exception cref="ModelFileException">Anything in it is not right.</exception>
    public static ModelContent Read(SourceText source)
    {
        ContentReader reader = new(source);
        return reader.top.Find("vertex") is { } vertex ? reader.OnEdges(vertex) : reader.OnSites();
    }

    /// <summary>True for a lower case letter followed by letters, digits and single hyphens.</summary>
    /// <param name="name">Any text.</param>
    public static bool IsHyphenated(string name) => name.Length is > 0 and <= Limits.NameLength
        && char.IsAsciiLetterLower(name[0])
        && name[^1] != '-'
        && name.All(c => char.IsAsciiLetterLower(c) || char.IsAsciiDigit(c) || c == '-');

    private ModelContent OnSites()
    {
        TableReader site = TableReader.Of(top.Find("site") ?? throw top.Table.Error("The variables are missing. Add a table [site], such as s = [-1, 1] below it, or [vertex] for variables on the edges."), "[site]");
        site.Limit();
        if (site.Entries.Count == 0)
            throw site.Table.Error("[site] has no variable. Add one, such as s = [-1, 1].");
        foreach (NodeEntry entry in site.Entries)
            names.AddVariable(entry.Key, entry.Start);
        VariableReader reader = new(globals.Scope);
        TermReader terms = new(globals, [.. site.Entries.Select(e => e.Key)], ClusterKey.Of(lattice));
        return Common(terms) with
        {
            Variables = [.. site.Entries.Select(e => reader.Read(e.Key, e.Value))],
            Energy = CheckEnergy(top.Find("energy"), terms.Table(top.Find("energy"), "[energy]", ExpressionType.Number)),
            Weight = terms.Table(top.Find("weight"), "[weight]", ExpressionType.Number),
            Require = terms.Table(top.Find("require"), "[require]", ExpressionType.Truth),
        };
    }

    private ModelContent OnEdges(Node node)
    {
        foreach (string key in SiteTables)
        {
            if (top.Find(key) is { } other)
                throw other.Error($"[{key}] and [vertex] exclude each other. Keep [site] with its tables for variables on sites, or [vertex] for variables on edges.");
        }
        if (lattice is not (LatticeKind.Square or LatticeKind.Honeycomb))
            throw node.Error("[vertex] is for the lattices square and honeycomb. Choose one of them, or put the variables on sites.");
        VertexReader vertex = new(TableReader.Of(node, "[vertex]"), lattice, globals);
        vertex.Check();
        TermReader terms = new(globals, [""], [ClusterKey.Vertex(lattice)]);
        return Common(terms) with
        {
            OnEdges = true,
            Variables = [vertex.Edge()],
            Energy = CheckEnergy(node.Find("energy")?.Value, vertex.Term("energy", terms)),
            Weight = vertex.Term("weight", terms),
            Rows = vertex.Rows(),
        };
    }

    private ModelContent Common(TermReader terms)
    {
        string name = Name();
        ImmutableArray<FileObservable> observables = new ObservableReader(terms, lattice).Read(top.Find("observables"));
        ReferenceReader references = new(globals);
        return new()
        {
            Name = name,
            Title = top.Text("title")?.Trim() is { Length: > 0 } title ? title : name,
            Description = top.Text("description")?.Trim() ?? "",
            Lattice = lattice,
            OnEdges = false,
            Globals = globals,
            Variables = [],
            Energy = [],
            Weight = [],
            Require = [],
            Rows = null,
            Observables = observables,
            Form = Form(),
            Critical = references.Critical(top.Find("critical")),
            References = references.References(top.Find("reference"), observables),
            Solution = Solution(),
            Root = top.Table,
        };
    }

    private string Name()
    {
        string name = top.RequiredText("name", "\"my-model\"");
        return IsHyphenated(name)
            ? name
            : throw top.Find("name")!.Error($"The name {SourceText.Quote(name)} is not valid. Use up to {Limits.NameLength} lower case letters, digits and hyphens, a letter first, such as \"my-model\".");
    }

    private NetworkForm Form()
    {
        if (top.Find("network") is not { } node)
            return NetworkForm.Auto;
        TableReader table = TableReader.Of(node, "[network]");
        table.Allow("form");
        NetworkForm form = Choice("form", table.RequiredText("form", "\"face\""), table, Forms);
        bool onEdges = top.Find("vertex") is not null;
        if (form != NetworkForm.Auto && onEdges != (form == NetworkForm.Vertex))
            throw table.Find("form")!.Error($"The form '{Lower(form)}' is for variables on {(onEdges ? "sites" : "edges")}. {(onEdges ? "Remove the key" : "Choose bond, face, row or triangles, or remove the key")}.");
        return form;
    }

    private IKnownSolution? Solution()
    {
        if (top.Text("solution") is not { } name)
            return null;
        string names = KnownSolutions.Names.Count == 0 ? "none" : string.Join(", ", KnownSolutions.Names);
        return KnownSolutions.Find(name)
            ?? throw top.Find("solution")!.Error($"There is no solution {SourceText.Quote(name)}.{NameSuggestion.Text(name, KnownSolutions.Names)} There are: {names}. Name one of them, or remove the key.");
    }

    private ImmutableArray<LocalTerm> CheckEnergy(Node? node, ImmutableArray<LocalTerm> terms) => node is null || globals.HasTemperature
        ? terms
        : throw node.Error("Energies need a temperature. Add T = 1 to [parameters], or give Boltzmann weights in [weight].");

    private static T Choice<T>(string key, string value, TableReader table, Dictionary<string, T> choices) => choices.TryGetValue(value, out T? choice)
        ? choice
        : throw table.Find(key)!.Error($"'{key}' cannot be {SourceText.Quote(value)}.{NameSuggestion.Text(value, choices.Keys)} Choose one of: {string.Join(", ", choices.Keys)}.");

    private static string Lower<T>(T value)
        where T : struct, Enum => value.ToString().ToLowerInvariant();
}
