using Looseloop.Bench;
using Looseloop.Link;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box.Tests;

public class BoxSessionTests
{
    private static readonly TimeSpan _patience = TimeSpan.FromSeconds(5);

    [Fact]
    public void Points_lost_on_the_line_are_asked_for_again()
    {
        using var box = new VirtualBox(WorldShelf.Load("wren"));
        using var link = new DamagedLink(box, fromBox: 1e-3, toBox: 0);
        using BoxSession session = BoxSession.Open(link, _patience);
        IReadOnlyList<Setting> settings = session.Grid.Between(140_000, 160_000, 0.5);
        SweepResult result = session.Sweep(new SweepRequest(settings, 500, 20) { ThereAndBack = true });
        Assert.True(link.Damaged > 0);
        Assert.True(session.Counters.PointsAskedAgain > 0);
        Assert.True(session.Counters.Damaged > 0 && session.Counters.Missing > 0);
        Assert.Equal(0, result.Missing);
        Assert.All(settings, setting => Assert.Equal(2, result.Points.Count(point => point.Setting == setting)));
    }

    [Fact]
    public void Requests_damaged_on_the_way_are_sent_again()
    {
        using var box = new VirtualBox(WorldShelf.Load("wren"));
        using var link = new DamagedLink(box, fromBox: 0, toBox: 2e-3);
        using BoxSession session = BoxSession.Open(link, _patience);
        LimitsAnswer limits = session.Limits();
        for (int i = 0; i < 40; i++)
        {
            Assert.Equal(limits, session.Limits());
        }

        Assert.True(session.Counters.Repeated > 0);
    }

    [Fact]
    public void An_unplugged_box_is_a_lost_link_and_a_reset_one_has_another_boot_number()
    {
        var box = new VirtualBox(WorldShelf.Load("wren"));
        using BoxSession session = BoxSession.Open(box, _patience);
        long boot = session.Identity.BootId;
        box.Reset();
        using BoxSession again = BoxSession.Open(box, _patience);
        Assert.NotEqual(boot, again.Identity.BootId);
        box.Unplug();
        Assert.Throws<LinkLostException>(() => again.Dark(10));
    }

    [Fact]
    public void Cancelling_a_sweep_leaves_the_drive_off()
    {
        using var box = new VirtualBox(WorldShelf.Load("wren"));
        using BoxSession session = BoxSession.Open(box, _patience);
        using var cancel = new CancellationTokenSource();
        IReadOnlyList<Setting> settings = session.Grid.Between(100_000, 200_000, 0.5);
        Assert.Throws<OperationCanceledException>(() =>
            session.Sweep(new SweepRequest(settings, 5_000, 50), _ => cancel.Cancel(), cancel.Token));
        Assert.False(box.Board.IsDriving);
        Assert.Equal(8_000, session.Identity.LowestHz);
        Assert.True(session.Dark(10).Samples > 10);
    }

    // Common practice, no source: a plan of an octave of settings in a handful of lines keeps a survey quick.
    [Fact]
    public void A_survey_takes_few_plan_lines_and_a_mixed_list_the_others()
    {
        var grid = new SettingGrid(FrequencyGrid.Esp32DutyBits);
        IReadOnlyList<Setting> octave = grid.Between(80_000, 140_000, 0.5);
        Assert.InRange(PlanLines.For(octave).Count, 1, 4);
        Setting[] mixed = [.. octave.Take(20).Select((setting, i) => SettingGrid.WithDuty(setting, i % 2 == 0 ? 0.5 : 0.2))];
        Assert.Equal(3, PlanLines.For(mixed).Count);
        Assert.Equal(20, PlanLines.For(mixed).Sum(line => line.Entries));
    }
}
