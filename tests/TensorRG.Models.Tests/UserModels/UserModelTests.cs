using System.Globalization;
using TensorRG.Models.Files;
using TensorRG.Models.Lattices;
using TensorRG.Models.Tests.Lattices;

namespace TensorRG.Models.Tests.UserModels;

/// <summary>Random model files: what the program makes of the text against sums over configurations that were never text.</summary>
public class UserModelTests
{
    private const int Files = 240;

    private static readonly (int Lx, int Ly)[] Tori = [(1, 1), (2, 1), (1, 2), (2, 2)];

    [Fact]
    public void Random_files_agree_with_sums_over_configurations()
    {
        // The seed says everything; other files than those of every day: TENSORRG_FIRST_SEED=1000 dotnet test ...
        int first = int.Parse(Environment.GetEnvironmentVariable("TENSORRG_FIRST_SEED") ?? "1", CultureInfo.InvariantCulture), compared = 0;
        var failures = new List<string>();
        for (int seed = first; seed < first + Files; seed++)
        {
            if (Record.Exception(() => compared += Agrees(seed) ? 1 : 0) is { } failure)
                failures.Add(failure.Message);
        }

        Assert.True(failures.Count == 0, $"{failures.Count} failures\n" + string.Join("\n\n", failures));
        Assert.True(compared >= 200, $"{compared} of {Files} files were compared");
    }

    // Once off by 6e-6, 8e-11 and 4e-11: directions that only impurities reach were not quite orthogonal to the others.
    [Theory]
    [InlineData(219339579)]
    [InlineData(2020263008)]
    [InlineData(2007)]
    public void Files_that_once_failed(int seed) => Assert.True(Agrees(seed));

    // False where no configuration is left.
    private static bool Agrees(int seed)
    {
        var random = new RandomUserModel(seed);
        try
        {
            return Compare(random);
        }
        catch (Exception e)
        {
            throw new InvalidOperationException($"seed {seed}: {e.Message}\n{random.Text}", e);
        }
    }

    private static bool Compare(RandomUserModel random)
    {
        LatticeSystem expected = random.System;
        var options = new NetworkOptions { Observables = random.Names };
        if (Tori.All(t => double.IsNegativeInfinity(new TorusOracle(expected, new NetworkOptions(), t.Lx, t.Ly).LogScale)))
            return false;
        FileModel model = ModelFile.Parse(random.Text, "random.toml");
        ParameterSet parameters = model.CreateParameters();
        ModelNetwork built = NetworkBuilder.Build(model.System(parameters)!, options with { Form = model.Form });
        Assert.Equal(expected.Observables.Length + 1, model.System(parameters)!.Observables.Length);
        int tori = 0;
        foreach ((int lx, int ly) in Tori)
        {
            if (!NetworkCheck.IsSmall(built, expected, lx, ly))
                continue;
            NetworkCheck.Compare(built, expected, options, lx, ly, powers: 2);
            tori++;
        }
        Assert.InRange(tori, 1, Tori.Length);
        return true;
    }
}
