using System.Globalization;
using TensorRG.CoarseGraining;
using TensorRG.EndToEnd.Harness;
using Xunit.Abstractions;

namespace TensorRG.EndToEnd;

/// <summary>
/// Kill -9 at random instants over the whole life of the process. TENSORRG_TEST_SEED replays other instants; the
/// instants of a failed test are in its message.
/// </summary>
public class KillTests(ITestOutputHelper output)
{
    private const int KillsPerScheme = 14;
    private const int LeastDuringComputation = 5;
    private const int BlowsInARow = 6;
    private const int MostChains = 30;

    public static TheoryData<string> Schemes => [.. SchemeRegistry.All.Select(static s => s.Name)];

    private static int Seed => int.TryParse(
        Environment.GetEnvironmentVariable("TENSORRG_TEST_SEED"), NumberStyles.Integer, CultureInfo.InvariantCulture, out int seed) ? seed : 20250314;

    [Theory]
    [MemberData(nameof(Schemes))]
    public void Killed_again_and_again_a_run_comes_to_the_same_bits(string scheme)
    {
        using KillCampaign campaign = new(RunSetup.Long(scheme), Seed);
        for (int i = 0; i < MostChains && !IsEnough(campaign); i++)
            campaign.Chain(BlowsInARow);
        output.WriteLine(campaign.Story);
        Assert.True(IsEnough(campaign), $"{campaign.Kills} kills, {campaign.KillsDuringComputation} of them during the computation.\n{campaign.Story}");
        Assert.True(campaign.Resumed > 0, campaign.Story);
    }

    [Fact]
    public void Schemes_are_those_that_the_command_line_offers()
    {
        using TemporaryFolder folder = new();
        string help = CommandLineProcess.Run(folder.Path, "run", "--help").Expect(0).Out;
        Assert.Contains("--scheme <" + string.Join('|', SchemeRegistry.All.Select(static s => s.Name)) + ">", help, StringComparison.Ordinal);
        Assert.True(SchemeRegistry.All.Length * KillsPerScheme >= 40);
    }

    private static bool IsEnough(KillCampaign campaign)
        => campaign.Kills >= KillsPerScheme && campaign.KillsDuringComputation >= LeastDuringComputation;
}
