using Looseloop.RecordBench;

namespace Looseloop.Record.Tests;

public sealed class KillTests : IDisposable
{
    private readonly TemporaryFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    // SIGKILL at random moments of a log in another process; two hundred of them: RecordBench kill FILE 200.
    [Fact]
    public void No_acknowledged_reading_is_lost_when_the_program_is_killed()
    {
        KillTrial trial = new(_folder.File("a.db"), seed: 1);
        for (int i = 0; i < 20; i++)
        {
            string? wrong = trial.Once(typeof(KillTrial).Assembly.Location);
            Assert.True(wrong is null, $"kill {i + 1}: {wrong}");
        }

        Assert.True(trial.Acknowledged > 20, $"only {trial.Acknowledged} readings were acknowledged: the kills came too early to show anything");
    }
}
