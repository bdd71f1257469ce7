using System.Text.Json;

namespace Looseloop.CommandLine.Tests.Record;

public sealed class ShowCommandTests : IDisposable
{
    private readonly SampleRecord _record = new();

    public void Dispose() => _record.Dispose();

    [Fact]
    public void A_reading_is_shown_with_figures_verdict_curve_and_origin()
    {
        AppRun run = _record.Run("show", "before", "--budget");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("150 000", run.Out);
        Assert.Contains("sound", run.Out);
        Assert.Contains("frequency in kHz", run.Out);
        Assert.Contains("crystal, 30 ppm", run.Out);
        Assert.Contains("top ring 300x80", run.Out);
    }

    [Fact]
    public void As_JSON_it_is_one_object()
    {
        JsonElement shown = JsonDocument.Parse(_record.Run("show", "3", "--json").Out).RootElement;
        Assert.Equal(3, shown.GetProperty("reading").GetInt32());
        Assert.Equal(150200, shown.GetProperty("f0_hz").GetDouble());
    }

    [Fact]
    public void A_plot_is_written_as_a_picture()
    {
        string picture = _record.File("curve.png");
        Assert.Equal(0, _record.Run("show", "1", "--plot", picture).ExitCode);
        Assert.Equal(0x89, File.ReadAllBytes(picture)[0]);
        Assert.Equal(2, _record.Run("show", "1", "--plot", _record.File("curve.bmp")).ExitCode);
    }

    [Fact]
    public void What_is_not_there_is_said_in_a_sentence()
    {
        AppRun run = _record.Run("show", "9999");
        Assert.Equal(1, run.ExitCode);
        Assert.Contains("no reading 9999", run.Error);
    }
}
