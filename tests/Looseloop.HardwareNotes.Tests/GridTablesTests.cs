using Looseloop.Protocol;

namespace Looseloop.HardwareNotes.Tests;

/// <summary>What the page on the boards says about the grid.</summary>
public sealed class GridTablesTests
{
    /// <summary>Within what a box may drive, both families of timers make the same settings: one table serves both.</summary>
    [Fact]
    public void Both_families_have_the_same_grid_from_8_kilohertz()
    {
        for (int request = WireLimits.LowestHz; request <= WireLimits.HighestHz; request++)
        {
            Assert.Equal(
                FrequencyGrid.DutyBits(request, FrequencyGrid.Esp32DutyBits),
                FrequencyGrid.DutyBits(request, FrequencyGrid.S3DutyBits));
        }
    }

    /// <summary>Steps read in the runtime's source: 80 Hz at 40 kHz, 563 Hz at 150 kHz, 1126 Hz at 300 kHz.</summary>
    [Theory]
    [InlineData(40e3, 80)]
    [InlineData(150e3, 563)]
    [InlineData(300e3, 1126)]
    public void Steps(double frequencyHz, double stepHz) => Assert.InRange(GridTables.StepHz(frequencyHz) / stepHz, 0.98, 1.02);

    /// <summary>At 150 kHz a coil of Q 200 has 13 settings within five bandwidths, counted by hand from the step: 7500/563.</summary>
    [Fact]
    public void Usable_quality_at_150_kilohertz() => Assert.InRange(GridTables.UsableQ(150e3, 13, [1]), 170, 210);
}
