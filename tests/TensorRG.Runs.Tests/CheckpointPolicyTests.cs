namespace TensorRG.Runs.Tests;

public class CheckpointPolicyTests
{
    [Theory]
    [InlineData(10.0, 0.1)]
    [InlineData(1.0, 0.019)]
    public void Slow_steps_are_each_stored(double stepSeconds, double saveSeconds)
    {
        (int saves, _) = Simulate(new ManualClock(), 100, _ => stepSeconds, saveSeconds, CheckpointPolicy.DefaultShare);
        Assert.Equal(100, saves);
    }

    [Theory]
    [InlineData(0.001, 0.005)]
    [InlineData(0.01, 0.01)]
    [InlineData(0.5, 1.0)]
    public void Fast_steps_are_stored_as_often_as_the_share_allows(double stepSeconds, double saveSeconds)
    {
        (int saves, double share) = Simulate(new ManualClock(), 20000, _ => stepSeconds, saveSeconds, CheckpointPolicy.DefaultShare);
        Assert.InRange(share, 0.9 * CheckpointPolicy.DefaultShare, CheckpointPolicy.DefaultShare + (2 * saveSeconds / (20000 * stepSeconds))); // the uncounted first and the one begun last
        Assert.True(saves is > 1 and < 20000);
    }

    [Fact]
    public void First_step_is_stored()
    {
        Assert.True(new CheckpointPolicy(clock: new ManualClock()).IsDue());
    }

    [Fact]
    public void Share_of_one_stores_every_step()
    {
        (int saves, _) = Simulate(new ManualClock(), 1000, step => step % 7 == 0 ? 0 : 1e-6, 1.0, share: 1);
        Assert.Equal(1000, saves);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-0.1)]
    [InlineData(1.01)]
    [InlineData(double.NaN)]
    public void Share_out_of_range_is_refused(double share) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new CheckpointPolicy(share));

    private static (int Saves, double Share) Simulate(
        ManualClock clock, int steps, Func<int, double> stepSeconds, double saveSeconds, double share)
    {
        CheckpointPolicy policy = new(share, clock);
        clock.Advance(1000);
        policy.Start();
        long start = clock.GetTimestamp();
        int saves = 0;
        for (int step = 0; step < steps; step++)
        {
            clock.Advance(stepSeconds(step));
            if (!policy.IsDue())
                continue;
            policy.Measure(() => clock.Advance(saveSeconds));
            saves++;
        }

        return (saves, policy.Spent / clock.GetElapsedTime(start));
    }
}
