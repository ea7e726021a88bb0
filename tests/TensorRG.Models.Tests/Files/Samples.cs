using TensorRG.Models.Files;

namespace TensorRG.Models.Tests.Files;

/// <summary>Valid model files that use every key between them.</summary>
internal static class Samples
{
    public const string Ising = """
        name = "ising-file"
        title = "Ising model"
        description = "Spins up and down."
        lattice = "square"

        [parameters]
        T = 2.0
        Jx = { default = 1, min = -5, max = 5, unit = "energy", meaning = "Horizontal coupling", shorthand = "J" }
        Jy = { default = 1, shorthand = "J" }
        h = 0

        [constants]
        K = "J2/T"
        J2 = "(Jx + Jy)/2"

        [site]
        s = [1, -1]

        [energy]
        site = "-h*s"
        bond_1 = "-Jx*s_i*s_j"
        bond_2 = "-Jy*s_i*s_j"

        [observables]
        magnetisation = { site = "s", order = true, meaning = "Mean spin", unit = "none" }
        staggered = { site = "s", staggered = true }
        link = { bond = "s_i*s_j" }
        corner = "K*s"

        [critical]
        temperature = "(Jx + Jy)/ln(1 + sqrt(2))"
        when = "Jx == Jy and Jx > 0 and h == 0"
        source = "L. Onsager, Phys. Rev. 65, 117 (1944)"

        [[reference]]
        quantity = "energy"
        value = "-sqrt(2)*Jx"
        when = "Jx == Jy and h == 0 and near(T, 2*Jx/ln(1+sqrt(2)))"
        uncertainty = 1e-15
        source = "L. Onsager, Phys. Rev. 65, 117 (1944)"

        [[reference]]
        quantity = "magnetisation"
        value = 0
        when = "Jx == 0 and Jy == 0 and h == 0"
        source = "independent spins"
        """;

    public const string HardSquares = """
        name = "hard-squares"
        lattice = "square"
        [parameters]
        z = { default = 1, min = 0, max = 1e6 }
        [site]
        n = "occupation"
        [weight]
        site = "z^n"
        [require]
        bond = "n_i*n_j == 0"
        [observables]
        density = "n"
        [network]
        form = "bond"
        """;

    public const string Faces = """
        name = "faces"
        lattice = "square"
        [parameters]
        T = { default = 1.5, min = 0.1 }
        q = { default = 3, whole = true, min = 2, max = 5 }
        h = { default = "0.1i", complex = true, min = -1, max = 1, meaning = "Field" }
        [constants]
        K = "-h/T"
        [site]
        k = "0..q-1"
        m = [0, "1/2"]
        [energy]
        face = "-delta(k_i, k_k) - delta(k_j, k_l)*m_i"
        diagonal = "0.1*k_i*k_j"
        diagonal_1 = "0.2*m_i"
        diagonal_2 = "0.3*m_j"
        bond = "k_i*m_j"
        site = "K*T*k_i"
        [network]
        form = "face"
        """;

    public const string Vertices = """
        name = "six"
        lattice = "square"
        [parameters]
        a = 1
        b = 0.5
        c = 2
        [vertex]
        edge = [0, 1]
        table = [
            { up = 0, left = 0, down = 0, right = 0, weight = "a" },
            { up = 1, left = 1, down = 1, right = 1, weight = "a" },
            { up = 1, left = 0, down = 1, right = 0, weight = "b" },
            { up = 0, left = 1, down = 0, right = 1, weight = "b" },
            { up = 1, left = 0, down = 0, right = 1, weight = "c" },
            { up = 0, left = 1, down = 1, right = 0, weight = "c" },
        ]
        [observables]
        lines = "(up + left)/2"
        turns = { vertex = "if(up == right and up != left, 1, 0)", staggered = true }
        [network]
        form = "vertex"
        """;

    public const string HoneycombVertices = """
        name = "loops"
        lattice = "honeycomb"
        parameters.T = 1
        [vertex]
        edge = "occupation"
        weight = "if(mod(e_1 + e_2 + e_3, 2) == 0, 1, 0)"
        energy = "e_1 + e_2 + 2*e_3"
        """;

    public const string Rotors = """
        name = "rotors"
        lattice = "triangular"
        [parameters]
        T = 1
        N = { default = 6, whole = true, min = 1, max = 64 }
        [site]
        theta = { circle = "2*N" }
        [energy]
        bond = "-cos(theta_i - theta_j)"
        triangle = "0.1*cos(theta_i + theta_j + theta_k)"
        triangle_up = "0.2*cos(theta_i)"
        triangle_down = "0.3*cos(theta_i)"
        bond_3 = "0.5"
        [network]
        form = "auto"
        """;

    public const string Field = """
        name = "field"
        lattice = "kagome"
        [parameters]
        T = 1
        w = 1.5
        [site]
        phi = { field = 9, width = "w" }
        c = { angles = 2 }
        [energy]
        site = "phi^2 + phi_i^4/10"
        triangle = "phi_i*phi_j*phi_k"
        bond = "cos(c_i - c_j)"
        """;

    public static IReadOnlyList<string> All { get; } = [Ising, HardSquares, Faces, Vertices, HoneycombVertices, Rotors, Field];

    public static FileModel Parse(string text) => ModelFile.Parse(text, "test.toml");
}
