using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using System.Text;
using TensorRG.Models.Lattices;
using TensorRG.Models.Tests.Lattices;

namespace TensorRG.Models.Tests.UserModels;

/// <summary>A random model as the text of a file, and as tables filled by C# that has not seen the text.</summary>
internal sealed class RandomUserModel
{
    private const double Largest = 3;

    private static readonly string[] Indices = ["i", "j", "k", "l"];

    private readonly Random random;
    private readonly LatticeKind lattice;
    private readonly bool onEdges;
    private readonly bool isComplex;
    private readonly double temperature;
    private readonly Dictionary<string, Complex> globals = [];
    private readonly ImmutableArray<RandomVariable> variables;
    private readonly double[][] states;
    private readonly StringBuilder text = new();
    private readonly List<ClusterTable> weights = [];
    private readonly List<ClusterTable> energies = [];
    private readonly List<LocalObservable> observables = [];

    public RandomUserModel(int seed)
    {
        random = new Random(seed);
        lattice = (LatticeKind)random.Next(4);
        onEdges = lattice is LatticeKind.Square or LatticeKind.Honeycomb && random.Next(3) == 0;
        isComplex = random.Next(4) == 0;
        temperature = Math.Round(0.8 + random.NextDouble(), 2);
        bool isThermal = random.Next(4) > 0;
        int q = random.Next(2, 4);
        variables = Variables(q);
        states = [.. Product(0)];
        Head(isThermal, q);
        if (onEdges)
            Vertex(isThermal);
        else
            Sites(isThermal);
        Observables(isThermal);
        if (random.Next(3) == 0)
            text.Append(CultureInfo.InvariantCulture, $"[network]\nform = \"{Form().ToString().ToLowerInvariant()}\"\n");
    }

    /// <summary>The file.</summary>
    public string Text => text.ToString();

    /// <summary>What it means.</summary>
    public LatticeSystem System => new()
    {
        Lattice = lattice,
        OnEdges = onEdges,
        StateLabels = [.. Systems.Labels(states.Length)],
        LogMeasure = [.. Enumerable.Range(0, states.Length).Select(Measure)],
        LogWeights = [.. weights],
        Observables = [.. observables],
    };

    /// <summary>The names of what can be measured.</summary>
    public ImmutableArray<string> Names => [.. observables.Select(static o => o.Name)];

    private ImmutableArray<RandomVariable> Variables(int q)
    {
        if (onEdges)
            return [RandomVariable.Draw(random, "edge", q, true)];
        bool two = random.Next(4) == 0 && lattice is LatticeKind.Square or LatticeKind.Honeycomb;
        return two
            ? [RandomVariable.Draw(random, "s", 2, false), RandomVariable.Draw(random, "phi", 2, false)]
            : [RandomVariable.Draw(random, random.Next(2) == 0 ? "s" : "sigma", q, true)];
    }

    // The value numbers of each variable, those of the last variable fastest.
    private IEnumerable<double[]> Product(int from) => from == variables.Length
        ? [[]]
        : Enumerable.Range(0, variables[from].Values.Length).SelectMany(n => Product(from + 1).Select(rest => (double[])[n, .. rest]));

    private double Measure(int state) => variables.Select((v, n) => v.LogMeasure[(int)states[state][n]]).Sum();

    private void Head(bool isThermal, int q)
    {
        text.Append(CultureInfo.InvariantCulture, $"name = \"random\"\nlattice = \"{lattice.ToString().ToLowerInvariant()}\"\n\n[parameters]\n");
        double a = Math.Round((2 * random.NextDouble()) - 1, 3), b = Math.Round((2 * random.NextDouble()) - 1, 3);
        if (isThermal)
            text.Append(CultureInfo.InvariantCulture, $"T = {temperature}\n");
        text.Append(CultureInfo.InvariantCulture, $"J = {a}\nB2 = {{ default = \"{b}\", min = -1, max = 1 }}\nq = {{ default = {q}, whole = true, min = 2, max = 3 }}\n");
        (globals["J"], globals["B2"], globals["q"]) = (a, b, q);
        if (isThermal)
            globals["T"] = temperature;
        if (isComplex)
        {
            text.Append("g = { default = \"0.3-0.4i\", complex = true }\n");
            globals["g"] = new Complex(0.3, -0.4);
        }
        Formula constant = Accepted(() => Formulas([], []).Real(2), [[]], []);
        text.Append(CultureInfo.InvariantCulture, $"\n[constants]\nK = \"{constant.Text}\"\n\n");
        globals["K"] = constant.Value(x => globals[x]);
    }

    private void Sites(bool isThermal)
    {
        text.Append("[site]\n");
        foreach (RandomVariable v in variables)
            text.Append(CultureInfo.InvariantCulture, $"{v.Name} = {v.Text}\n");
        string[] keys = [.. Keys().Where(k => Clusters(k)[0] is Cluster.Site or Cluster.Bond1 or Cluster.Bond2 || random.Next(2) == 0)];
        if (isThermal)
            Section("energy", keys, (name, sites) => Add(energies, name, sites, Number(2), z => -z / temperature));
        if (!isThermal || random.Next(3) == 0)
            Section("weight", keys, (name, sites) => Add(null, name, sites, Weight(), Log));
        if (random.Next(4) == 0)
            Section("require", keys, (name, sites) => Add(null, name, sites, static (f, depth) => f.Truth(depth), z => z != 0 ? 0 : double.NegativeInfinity));
    }

    private void Section(string name, string[] keys, Func<string, string[], string> term)
    {
        string[] used = [.. keys.Where(_ => random.Next(2) == 0)];
        text.Append(CultureInfo.InvariantCulture, $"\n[{name}]\n");
        foreach (string key in used.Length > 0 ? used : [keys[^1]])
            text.Append(CultureInfo.InvariantCulture, $"{key} = \"{term(key, Places(key))}\"\n");
    }

    // Weights that are positive, or of both signs, zero here and there, or complex.
    private Func<RandomFormula, int, Formula> Weight()
    {
        int kind = random.Next(4);
        return (f, depth) => kind switch
        {
            0 => Formula.Call("exp", static z => Complex.Exp(z), isComplex ? f.Complex(depth) : f.Real(depth)),
            1 => Formula.If(f.Truth(1), f.Real(depth), Formula.Number("1.5", 1.5)),
            _ => Formula.Binary("+", Formula.Number("1.5", 1.5), Formula.Call("tanh", static z => Math.Tanh(z.Real), f.Real(depth))),
        };
    }

    private Func<RandomFormula, int, Formula> Number(int kinds) => (f, depth) => isComplex && random.Next(kinds) == 0 ? f.Complex(depth) : f.Real(depth);

    private void Vertex(bool isThermal)
    {
        text.Append(CultureInfo.InvariantCulture, $"[vertex]\nedge = {variables[0].Text}\n");
        string[] legs = Places("vertex");
        int kind = random.Next(3);
        if (isThermal)
            text.Append(CultureInfo.InvariantCulture, $"energy = \"{Add(energies, "vertex", legs, Number(2), z => -z / temperature)}\"\n");
        if (kind == 0 || (kind == 1 && !isThermal))
            text.Append(CultureInfo.InvariantCulture, $"weight = \"{Add(null, "vertex", legs, Weight(), Log)}\"\n");
        else if (kind == 2 || !isThermal)
            Rows(legs);
    }

    private void Rows(string[] legs)
    {
        var values = new Complex[(int)Math.Pow(states.Length, legs.Length)];
        Array.Fill(values, double.NegativeInfinity);
        var rows = new List<string>();
        for (int n = 0; n < values.Length; n++)
        {
            if (random.Next(3) == 0 && rows.Count > 0)
                continue;
            Formula weight = Accepted(() => Weight()(Formulas([], []), 1), [[]], []);
            values[n] = Log(weight.Value(x => globals[x]));
            int[] digits = Digits(n, legs.Length);
            IEnumerable<string> row = legs.Select((leg, k) => string.Create(CultureInfo.InvariantCulture, $"{leg} = {variables[0].Values[digits[k]]:R}"));
            rows.Add($"  {{ {string.Join(", ", row)}, weight = \"{weight.Text}\" }}");
        }
        text.Append(CultureInfo.InvariantCulture, $"table = [\n{string.Join(",\n", rows)}\n]\n");
        weights.Add(new ClusterTable(Cluster.Vertex, [.. values]));
    }

    private void Observables(bool isThermal)
    {
        text.Append("\n[observables]\n");
        if (isThermal)
            observables.Add(new("energy", "", "", [.. energies]));
        for (int n = 0; n < 2; n++)
        {
            string key = Keys()[random.Next(Keys().Length)], name = $"o-{n}";
            bool staggered = random.Next(6) == 0 && states.Length == 2 && (lattice != LatticeKind.Honeycomb || key == "site") && !(onEdges && lattice == LatticeKind.Honeycomb);
            List<ClusterTable> tables = [];
            string term = Add(tables, key, Places(key), Number(3), null);
            text.Append(CultureInfo.InvariantCulture, $"{name} = {{ {key} = \"{term}\"{(staggered ? ", staggered = true" : "")} }}\n");
            observables.Add(new(name, "", "", [.. tables]) { IsStaggered = staggered });
        }
    }

    // A term of random form: its text, and its tables on all clusters of the key. With a logarithm the table counts among the weights.
    private string Add(List<ClusterTable>? raw, string key, string[] places, Func<RandomFormula, int, Formula> make, Func<Complex, Complex>? log)
    {
        string[] names = [.. places.SelectMany(place => variables.Select(v => NameAt(v.Name, place)))];
        string[] exact = [.. places.SelectMany(place => variables.Where(static v => v.IsExact).Select(v => NameAt(v.Name, place)))];
        int[][] configurations = [.. Enumerable.Range(0, (int)Math.Pow(states.Length, places.Length)).Select(n => Digits(n, places.Length))];
        Formula formula = Accepted(() => make(Formulas(names, exact), random.Next(1, 4)), configurations, places);
        Complex[] values = [.. configurations.Select(c => formula.Value(x => Lookup(x, places, c)))];
        foreach (Cluster cluster in Clusters(key))
        {
            raw?.Add(new ClusterTable(cluster, [.. values]));
            if (log is not null)
                weights.Add(new ClusterTable(cluster, [.. values.Select(log)]));
        }
        return formula.Text;
    }

    // The first of the formulas with finite and moderate values that do not all vanish.
    private Formula Accepted(Func<Formula> make, int[][] configurations, string[] places)
    {
        while (true)
        {
            Formula formula = make();
            double[] sizes = [.. configurations.Select(c => Complex.Abs(formula.Value(x => Lookup(x, places, c))))];
            if (formula.Text.Length < 400 && sizes.All(static x => x <= Largest && (x == 0 || x > 1e-6)) && sizes.Any(static x => x > 0))
                return formula;
        }
    }

    private RandomFormula Formulas(string[] names, string[] exact)
    {
        string[] own = [.. globals.Keys.Where(static x => x != "g")];
        return new RandomFormula(random, [.. names, .. names, .. own], globals.ContainsKey("q") ? [.. exact, .. exact, "q"] : exact, isComplex ? ["g"] : []);
    }

    private Complex Lookup(string name, string[] places, int[] configuration)
    {
        if (globals.TryGetValue(name, out Complex value))
            return value;
        for (int k = 0; k < places.Length; k++)
        {
            for (int n = 0; n < variables.Length; n++)
            {
                if (name == NameAt(variables[n].Name, places[k]) || (places.Length == 1 && name == variables[n].Name))
                    return variables[n].Values[(int)states[configuration[k]][n]];
            }
        }
        throw new InvalidOperationException($"'{name}' has no value.");
    }

    private string NameAt(string variable, string place) => onEdges ? place : place.Length == 0 ? variable : $"{variable}_{place}";

    private static Complex Log(Complex weight) => weight == 0 ? double.NegativeInfinity : Complex.Log(weight);

    private int[] Digits(int number, int count)
    {
        var digits = new int[count];
        for (int k = count - 1; k >= 0; k--, number /= states.Length)
            digits[k] = number % states.Length;
        return digits;
    }

    private string[] Keys() => (lattice, onEdges) switch
    {
        (_, true) => ["vertex"],
        (LatticeKind.Square, _) => ["site", "bond", "bond_1", "bond_2", "diagonal", "diagonal_1", "diagonal_2", "face"],
        (LatticeKind.Honeycomb, _) => ["site", "bond", "bond_1", "bond_2", "bond_3"],
        _ => ["site", "bond", "bond_1", "bond_2", "bond_3", "triangle", "triangle_up", "triangle_down"],
    };

    // Legs of a vertex, else indices of sites; a single site may go without.
    private string[] Places(string key) => key switch
    {
        "vertex" => lattice == LatticeKind.Honeycomb ? ["e_1", "e_2", "e_3"] : ["up", "left", "down", "right"],
        "site" => random.Next(2) == 0 ? [""] : ["i"],
        _ => Indices[..Systems.Arity(Clusters(key)[0])],
    };

    private Cluster[] Clusters(string key) => key switch
    {
        "vertex" => [Cluster.Vertex],
        "site" => [Cluster.Site],
        "bond" => lattice == LatticeKind.Square ? [Cluster.Bond1, Cluster.Bond2] : [Cluster.Bond1, Cluster.Bond2, Cluster.Bond3],
        "bond_1" => [Cluster.Bond1],
        "bond_2" => [Cluster.Bond2],
        "bond_3" => [Cluster.Bond3],
        "diagonal" => [Cluster.Diagonal, Cluster.Antidiagonal],
        "diagonal_1" => [Cluster.Diagonal],
        "diagonal_2" => [Cluster.Antidiagonal],
        "face" => [Cluster.Face],
        "triangle" => [Cluster.UpTriangle, Cluster.DownTriangle],
        "triangle_up" => [Cluster.UpTriangle],
        _ => [Cluster.DownTriangle],
    };

    private NetworkForm Form() => (onEdges, lattice) switch
    {
        (true, _) => NetworkForm.Vertex,
        (_, LatticeKind.Honeycomb) => NetworkForm.Bond,
        (_, LatticeKind.Kagome) => NetworkForm.Triangles,
        _ => random.Next(2) == 0 ? NetworkForm.Row : NetworkForm.Face,
    };
}
