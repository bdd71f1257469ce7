namespace Looseloop.HardwareNotes.Tests;

public sealed class SpiceRunTests
{
    /// <summary>Two per cent: the simulator's own step control differs a little from version to version.</summary>
    [NgspiceFact]
    public void The_netlists_still_give_the_committed_results()
    {
        SpiceResults today = Ngspice.Run();
        Assert.Equal(SpiceResults.Committed.Names, today.Names);
        Assert.All(
            SpiceResults.Committed.Names,
            name =>
            {
                double committed = SpiceResults.Committed[name];
                Assert.InRange(today[name], committed - 0.02 * Math.Abs(committed) - 1e-4, committed + 0.02 * Math.Abs(committed) + 1e-4);
            });
    }
}
