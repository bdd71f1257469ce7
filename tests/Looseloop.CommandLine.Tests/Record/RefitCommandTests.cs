using System.Text.Json;
using Looseloop.Readings;
using Looseloop.Record;
using Looseloop.RecordBench;

namespace Looseloop.CommandLine.Tests.Record;

/// <summary>Refits through SQLite and back; what a fit should give again is what it gave the first time.</summary>
public sealed class RefitCommandTests : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("looseloop-refit-");

    public void Dispose() => _folder.Delete(recursive: true);

    private string Path(string name = "record.db") => System.IO.Path.Combine(_folder.FullName, name);

    private AppRun Run(params string[] args) => AppRun.Of([.. args, "--record", Path()]);

    [Fact]
    public void The_same_fit_gives_the_same_figures_and_the_original_stays_byte_for_byte()
    {
        Read();
        string before = Run("export", "1", "--json").Out;
        JsonElement refit = JsonDocument.Parse(Run("refit", "--json", "--quiet").Out).RootElement;
        Assert.True(refit.GetProperty("same").GetBoolean());
        Assert.Equal(1, refit.GetProperty("reading").GetInt32());
        Assert.Equal(2, refit.GetProperty("refit").GetInt32());
        Assert.Equal(refit.GetProperty("kept").GetProperty("f0_hz").GetDouble(), refit.GetProperty("now").GetProperty("f0_hz").GetDouble());
        Assert.Equal(
            refit.GetProperty("kept").GetProperty("u_q_absolute_relative").GetDouble(),
            refit.GetProperty("now").GetProperty("u_q_absolute_relative").GetDouble());
        Assert.Equal(before, Run("export", "1", "--json").Out);
    }

    [Fact]
    public void It_says_that_nothing_changed_and_show_lists_it()
    {
        Read();
        AppRun refit = Run("refit", "last");
        Assert.Equal(0, refit.ExitCode);
        Assert.Contains("Nothing changed", refit.Out);
        Assert.Contains("both are kept", refit.Out);
        AppRun shown = Run("show", "1");
        Assert.Contains("fitted again as reading 2", shown.Out);
        Assert.Contains("refit of reading 1", Run("show", "2").Out);

        // "last" is the last one taken, and a refit is fitted from its original.
        Assert.Contains("reading 1 fitted again as reading 3", Run("refit", "2").Out);
        Assert.Equal([2, 3], JsonDocument.Parse(Run("show", "1", "--json").Out).RootElement.GetProperty("refits").EnumerateArray().Select(number => number.GetInt32()));
    }

    [Fact]
    public void A_law_that_was_read_since_gives_a_change_and_is_named()
    {
        Read();
        using (RecordStore store = RecordStore.Open(Path(), DateTimeOffset.UtcNow))
        {
            Reading reading = store.Reader.Reading(1);
            DetectorLaw read = reading.Basis!.Law with
            {
                PedestalCounts = reading.Basis.Law.PedestalCounts - 10,
                PedestalUncertainty = 4,
                ReadOn = reading.Utc,
                BowBound = 0.001,
            };
            new RecordFacts(store, "test").Keep(reading.Box.Port, read);
        }

        Assert.Contains("Nothing changed", Run("refit").Out);
        AppRun now = Run("refit", "--facts-now");
        Assert.Equal(0, now.ExitCode);
        Assert.Contains("detector's law", now.Out);
        Assert.Contains("gone: detector-not-read", now.Out);
        Assert.DoesNotContain("Nothing changed", now.Out);
        JsonElement changed = JsonDocument.Parse(Run("refit", "--facts-now", "--json").Out).RootElement;
        Assert.False(changed.GetProperty("same").GetBoolean());
        Assert.NotEqual(0, changed.GetProperty("q_change_relative").GetDouble());

        // The refit holds the law that it was made with.
        using RecordReader reader = RecordReader.Open(Path());
        Assert.NotNull(reader.Reading(changed.GetProperty("refit").GetInt64()).Basis!.Law.ReadOn);
        Assert.Null(reader.Reading(1).Basis!.Law.ReadOn);
    }

    [Fact]
    public void A_log_is_fitted_again_as_a_whole_and_comes_out_the_same()
    {
        AppRun log = AppRun.Of("log", "--box", "bench", "--for", "1min", "--near", "150k", "--coil", "tall", "--quiet", "--record", Path());
        Assert.Equal(0, log.ExitCode);
        AppRun refit = Run("refit", "--all", "--coil", "tall");
        Assert.Equal(0, refit.ExitCode);
        Assert.Contains("7 readings were fitted again, 0 came out otherwise; 0 could not be.", refit.Out);
        using RecordReader reader = RecordReader.Open(Path());
        Assert.Equal(14, reader.CountReadings());
        RunSummary run = reader.Runs(new HistoryQuery { Limit = 1 })[0];
        Assert.Equal("refit", run.Procedure);
        Assert.Equal(7, run.Stop!.Count);

        // A track is of readings that were taken: refits do not stand in it.
        Assert.Equal(7, reader.Track(1).Count());
        Assert.Contains("7 readings", Run("refit", "--all").Out);
    }

    [Fact]
    public void Several_are_named_and_what_cannot_be_fitted_is_said_for_each()
    {
        using (RecordStore store = RecordStore.Open(Path(), DateTimeOffset.UtcNow))
        {
            RunStart start = SampleReadings.Start("read");
            store.Append(start);
            store.Append(start.Id, SampleReadings.At(1) with { Points = [], Dark = [] });
            store.Append(start.Id, SampleReadings.At(2));
            store.Append(start.Id, SampleReadings.At(3) with { F0Hz = double.NaN, Q = double.NaN, Verdict = Verdict.None });
            store.Append(new RunStop(start.Id, DateTimeOffset.UtcNow, RunStatus.Completed, "done", 3));
        }

        Read();
        AppRun refit = Run("refit", "1", "2", "3", "last");
        Assert.Equal(1, refit.ExitCode);
        Assert.Contains("reading 1 has no raw points", refit.Error);
        Assert.Contains("reading 2 was kept by version 0.1.0 without what its fit was made with", refit.Error);
        Assert.Contains("reading 3 never came to a curve", refit.Error);
        Assert.Contains("reading 4 as 5: the same to rounding", refit.Out);
        AppRun all = Run("refit", "--all");
        Assert.Equal(0, all.ExitCode);
        Assert.Contains("1 reading was fitted again, 0 came out otherwise; 3 could not be.", all.Out);
        Assert.Contains("no raw points", all.Error);
    }

    [Fact]
    public void Refits_go_out_with_the_record_and_come_in_once()
    {
        Read();
        Run("refit", "last");
        string own = Path("own.db");
        AppRun first = AppRun.Of("import", Path(), "--record", own);
        Assert.Contains("2 readings in 2 new runs", first.Out);
        AppRun second = AppRun.Of("import", Path(), "--record", own);
        Assert.Contains("0 readings in 0 new runs", second.Out);
        Assert.Contains("fitted again as reading 2", AppRun.Of("show", "1", "--record", own).Out);
        Assert.Equal(Run("export", "--json").Out, AppRun.Of("export", "--json", "--record", own).Out);
        Assert.Contains("Nothing changed", AppRun.Of("refit", "1", "--record", own).Out);
        Assert.Contains("1 readings in 1 new runs", AppRun.Of("import", own, "--record", Path()).Out);
    }

    [Theory]
    [InlineData("--all", "3")]
    [InlineData("--coil", "tall")]
    public void What_does_not_go_together_is_a_usage_error(params string[] args)
    {
        Read();
        Assert.Equal(2, Run(["refit", .. args]).ExitCode);
    }

    [Fact]
    public void Without_a_record_none_is_made()
    {
        Assert.Equal(1, Run("refit").ExitCode);
        Assert.False(File.Exists(Path()));
    }

    private void Read() => Assert.Equal(0, Run("read", "--box", "bench", "--near", "150k", "--quiet").ExitCode);
}
