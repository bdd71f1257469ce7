using System.Text.Json;
using Looseloop.Drift;
using Looseloop.Rendering;
using Spectre.Console;

namespace Looseloop.Coils;

/// <summary>A window as a person reads it, and as JSON.</summary>
internal static class WindowText
{
    public static void Write(IAnsiConsole console, WindowFigures w, string from)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("", "cold", "loaded");
        table.Columns[1].RightAligned();
        table.Columns[2].RightAligned();
        table.AddRow(Markup.Escape($"f0 ({from})"), Words.Kilohertz(w.ColdHz), Words.Kilohertz(w.LoadedHz));
        table.AddRow(w.QIsBound ? "Q (what the copper allows)" : "Q", Words.Number(w.ColdQ, 0), Words.Number(w.LoadedQ, 0));
        for (int i = 0; i < w.Cold.Count; i++)
        {
            table.AddRow($"{Words.Number(100 * w.Cold[i].Fraction, 0)} % of amplitude", Range(w.Cold[i]), Range(w.Loaded[i]));
            table.AddRow("  coarsest step of a driver", Step(w.Cold[i]), Step(w.Loaded[i]));
        }

        console.Write(table);
        string kind = w.OscillatorIsResonant ? "LC" : "RC";
        console.MarkupLineInterpolated($"A component of {Words.Percent(w.ComponentRelative)} moves an {kind} oscillator by {Words.Number(w.ComponentShift.DownHz / 1e3, 2)} to +{Words.Number(w.ComponentShift.UpHz / 1e3, 2)} kHz: {(w.UntrimmedWillDo ? "inside the cold window" : "it must be trimmed on the coil, or follow it")}.");
        console.MarkupLineInterpolated($"A driver fixed on the cold f0 has {Words.Percent(w.ColdDriveOnLoaded, 0)} of the amplitude left with arcs.");
        if (w.Exit is not null)
        {
            console.MarkupLineInterpolated($"Warm-up: {ExitWords(w.Exit)}");
        }

        console.MarkupLineInterpolated(w.FixedWillDo
            ? (FormattableString)$"[bold]A fixed oscillator will do[/], if it is trimmed on the coil."
            : $"[bold]Feedback is needed[/]: a fixed oscillator does not stay within {Words.Percent(w.Cold[0].Fraction, 0)} of the amplitude.");
        if (w.QIsBound)
        {
            console.MarkupLine("[dim]Q was not read: the true one is lower, and the cold window wider.[/]");
        }
    }

    public static void WriteJson(Utf8JsonWriter json, WindowFigures w)
    {
        json.WriteNumber("schema_version", 1);
        json.Figure("cold_hz", w.ColdHz);
        json.Figure("cold_q", w.ColdQ);
        json.WriteBoolean("cold_q_is_bound", w.QIsBound);
        json.Figure("loaded_hz", w.LoadedHz);
        json.Figure("loaded_q", w.LoadedQ);
        Rows(json, "cold", w.Cold);
        Rows(json, "loaded", w.Loaded);
        json.WriteString("oscillator", w.OscillatorIsResonant ? "lc" : "rc");
        json.Figure("component_relative", w.ComponentRelative);
        json.Figure("component_down_hz", w.ComponentShift.DownHz);
        json.Figure("component_up_hz", w.ComponentShift.UpHz);
        json.WriteBoolean("untrimmed_will_do", w.UntrimmedWillDo);
        json.Figure("cold_drive_on_loaded", w.ColdDriveOnLoaded);
        json.WriteBoolean("fixed_will_do", w.FixedWillDo);
        if (w.Exit is WindowExit exit)
        {
            json.WriteString("warm_up", exit.Kind.ToString().ToLowerInvariant());
            json.Figure("leaves_after_s", exit.TimeS);
            json.Figure("leaves_earliest_s", exit.EarliestS);
            json.Figure("leaves_latest_s", exit.LatestS);
        }

        Cautions.Write(json, Looseloop.Coil.LoadedState.Caution, Cautions.Energise);
    }

    private static void Rows(Utf8JsonWriter json, string name, IReadOnlyList<WindowRow> rows) => json.Objects(name, rows, row =>
    {
        json.Figure("fraction", row.Fraction);
        json.Figure("lower_hz", row.Window.LowerHz);
        json.Figure("upper_hz", row.Window.UpperHz);
        json.Figure("coarsest_step_hz", row.Window.CoarsestStepHz);
    });

    private static string Range(WindowRow row) => $"{Words.Number(row.Window.LowerHz / 1e3, 3)} .. {Words.Kilohertz(row.Window.UpperHz, 3)}";

    private static string Step(WindowRow row) => $"{Words.Digits(row.Window.CoarsestStepHz, 3)} Hz";

    private static string ExitWords(WindowExit exit) => exit.Kind switch
    {
        WindowExitKind.Stays => "f0 stays inside the window.",
        WindowExitKind.Leaves => $"f0 leaves the window after {Minutes(exit.TimeS)} (between {Minutes(exit.EarliestS)} and {Minutes(exit.LatestS)}).",
        WindowExitKind.MayLeave => $"f0 may leave the window, from {Minutes(exit.EarliestS)} on.",
        WindowExitKind.Outside => "f0 has left the window already.",
        _ => "the run is too short to say when f0 leaves the window.",
    };

    private static string Minutes(double seconds) => double.IsFinite(seconds) ? $"{Words.Number(seconds / 60, 1)} min" : "never";
}
