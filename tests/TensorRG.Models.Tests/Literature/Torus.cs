namespace TensorRG.Models.Tests.Literature;

/// <summary>A torus of lx x ly cells, numbered row by row, y downward.</summary>
internal sealed record Torus(int Lx, int Ly)
{
    public int Cells => Lx * Ly;

    /// <summary>The number of cell (x, y), periodic.</summary>
    public int At(int x, int y) => ((((y % Ly) + Ly) % Ly) * Lx) + (((x % Lx) + Lx) % Lx);

    /// <summary>All pairs of a cell and the one that is (dx, dy) away from it.</summary>
    public (int I, int J)[] Pairs(int dx, int dy) => [.. Enumerable.Range(0, Cells).Select(c => (c, At((c % Lx) + dx, (c / Lx) + dy)))];

    /// <summary>(-1)^(x + y).</summary>
    public int Sign(int cell) => ((cell % Lx) + (cell / Lx)) % 2 == 0 ? 1 : -1;
}
