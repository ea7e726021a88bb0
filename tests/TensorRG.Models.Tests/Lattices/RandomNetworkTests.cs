using TensorRG.Models.Lattices;

namespace TensorRG.Models.Tests.Lattices;

public sealed class RandomNetworkTests
{
    private static readonly NetworkForm[] Forms = [NetworkForm.Auto, NetworkForm.Bond, NetworkForm.Face, NetworkForm.Row];

    private const int Systems = 80;

    [Fact]
    public void Random_systems_equal_the_sum_over_configurations_in_every_form()
    {
        for (int seed = 1; seed <= Systems; seed++)
        {
            var random = new RandomSystem(seed);
            foreach (NetworkForm form in Forms)
            {
                if (random.Build(form, seed % 2 == 0) is { } built)
                    Check(random, built, form);
            }
        }
    }

    private static void Check(RandomSystem random, ModelNetwork built, NetworkForm form)
    {
        foreach ((int lx, int ly) in new[] { (1, 1), (2, 1), (1, 2) })
        {
            if (NetworkCheck.IsSmall(built, random.System, lx, ly))
                NetworkCheck.Compare(built, random.System, random.Options with { Form = form }, lx, ly, powers: 2);
        }
    }
}
