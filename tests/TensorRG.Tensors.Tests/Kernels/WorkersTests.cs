using TensorRG.Tensors.Kernels;

namespace TensorRG.Tensors.Tests.Kernels;

public class WorkersTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(4)]
    public void Every_part_runs_exactly_once(int threads)
    {
        using var workers = new Workers(threads);
        var counts = new int[50];
        Action<int> body = part => Interlocked.Increment(ref counts[part]);
        for (int call = 0; call < 3000; call++)
            workers.Run(call % 50, body);
        for (int part = 0; part < 50; part++)
            Assert.Equal(60 * (49 - part), counts[part]);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(4)]
    public void The_exception_of_a_part_reaches_the_caller_and_the_team_survives(int threads)
    {
        using var workers = new Workers(threads);
        for (int call = 0; call < 50; call++)
        {
            InvalidOperationException e = Assert.Throws<InvalidOperationException>(() => workers.Run(8, part =>
            {
                if (part == 5)
                    throw new InvalidOperationException("part 5");
            }));
            Assert.Equal("part 5", e.Message);
            int done = 0;
            workers.Run(8, _ => Interlocked.Increment(ref done));
            Assert.Equal(8, done);
        }
    }

    [Fact]
    public void A_nested_call_runs_inline()
    {
        using var workers = new Workers(2);
        int inner = 0;
        workers.Run(6, _ =>
        {
            int thread = Environment.CurrentManagedThreadId;
            workers.Run(4, _ =>
            {
                Assert.Equal(thread, Environment.CurrentManagedThreadId);
                Interlocked.Increment(ref inner);
            });
        });
        Assert.Equal(24, inner);
    }

    [Fact]
    public void Calls_from_several_threads_at_once_all_complete()
    {
        using var workers = new Workers(2);
        var totals = new long[4];
        var callers = new Thread[4];
        for (int c = 0; c < 4; c++)
        {
            int caller = c;
            callers[c] = new Thread(() =>
            {
                Action<int> body = part => Interlocked.Add(ref totals[caller], part);
                for (int call = 0; call < 2000; call++)
                    workers.Run(10, body);
            });
            callers[c].Start();
        }

        foreach (Thread thread in callers)
            thread.Join();
        Assert.All(totals, total => Assert.Equal(2000 * 45, total));
    }

    [Fact]
    public void A_team_that_has_gone_to_sleep_wakes_up()
    {
        using var workers = new Workers(3);
        for (int call = 0; call < 20; call++)
        {
            Thread.Sleep(2);
            int sum = 0;
            workers.Run(100, part => Interlocked.Add(ref sum, part));
            Assert.Equal(4950, sum);
        }
    }

    [Fact]
    public void Both_threads_take_part()
    {
        using var workers = new Workers(2);
        using var meeting = new Barrier(2);

        // Each part waits for the other, so one thread alone could not finish.
        workers.Run(2, _ => Assert.True(meeting.SignalAndWait(TimeSpan.FromSeconds(30)), "the second thread never came"));
    }

    [Fact]
    public void A_call_allocates_nothing()
    {
        using var workers = new Workers(2);
        Action<int> body = static _ => { };
        workers.Run(8, body);
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int call = 0; call < 1000; call++)
            workers.Run(8, body);
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());
    }

    [Fact]
    public void Wrong_use_is_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new Workers(0));
        var workers = new Workers(2);
        Assert.Throws<ArgumentOutOfRangeException>(() => workers.Run(-1, _ => { }));
        workers.Dispose();
        workers.Dispose();
        Assert.Throws<ObjectDisposedException>(() => workers.Run(2, _ => { }));
    }
}
