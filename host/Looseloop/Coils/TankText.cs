using System.Text.Json;
using Looseloop.Coil;
using Looseloop.Rendering;
using Spectre.Console;

namespace Looseloop.Coils;

/// <summary>A tank as a person reads it, and as JSON.</summary>
internal static class TankText
{
    public static void Write(IAnsiConsole console, TankFigures t)
    {
        console.MarkupLineInterpolated($"[bold]{t.Coil.Name}[/]: primary of {Words.Number(t.Primary.Turns, 2)} turns, tap at {Words.Number(t.Tap, 2)}: {Words.Henry(t.InductanceH)}, {Words.Henry(t.MutualH)} to the secondary, k = {Words.Number(t.K, 3)} (leads not included)");
        Table states = new Table().Border(TableBorder.Simple).AddColumns("", "cold", "loaded");
        states.Columns[1].RightAligned();
        states.Columns[2].RightAligned();
        void Row(string name, Func<TankState, string> words) => states.AddRow(Markup.Escape(name), words(t.Cold), words(t.Loaded));
        Row($"secondary ({t.From})", s => Words.Kilohertz(s.SecondaryHz));
        if (t.Primary.CapacitorF is double c)
        {
            Row($"tap for {Words.Nanofarad(c)}", s => double.IsFinite(s.TapTurns) ? Words.Number(s.TapTurns, 2) + " turns" : "out of reach");
        }

        Row($"capacitor for {Words.Number(t.Tap, 2)} turns", s => Words.Nanofarad(s.CapacitorF));
        if (t.Cold.Drive is not null)
        {
            WriteDrive(t, Row);
        }

        console.Write(states);
        console.MarkupLineInterpolated($"Tuned to the cold secondary, the pair answers at {Words.Kilohertz(t.Split.LowerHz)} and {Words.Kilohertz(t.Split.UpperHz)}.");
        if (t.PrimaryReading is not null)
        {
            WriteMove(console, t);
        }

        WriteTaps(console, t);
    }

    public static void WriteJson(Utf8JsonWriter json, TankFigures t)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteString("coil", t.Coil.Name);
        json.WriteString("secondary_from", t.From);
        json.Figure("tap_turns", t.Tap);
        json.Figure("inductance_h", t.InductanceH);
        json.Figure("mutual_h", t.MutualH);
        json.Figure("k", t.K);
        json.Figure("capacitor_f", t.Primary.CapacitorF ?? double.NaN);
        json.Figure("bus_voltage_v", t.Primary.BusVoltageV ?? double.NaN);
        json.Figure("split_lower_hz", t.Split.LowerHz);
        json.Figure("split_upper_hz", t.Split.UpperHz);
        WriteState(json, "cold", t.Cold, t.ColdMoves);
        WriteState(json, "loaded", t.Loaded, t.LoadedMoves);
        json.Figure("primary_read_hz", t.PrimaryReading?.F0Hz ?? double.NaN);
        json.Objects("taps", t.Taps, row =>
        {
            json.Figure("turns", row.Turns);
            json.Figure("inductance_h", row.InductanceH);
            json.Figure("frequency_hz", row.FrequencyHz);
            json.Figure("k", row.Coupling);
            json.Figure("hz_per_cm", row.HzPerCentimetre);
        });
        json.Objects("turns", t.Turns, row =>
        {
            json.Figure("turns", row.Turns);
            json.Figure("inductance_h", row.InductanceH);
        });
        Cautions.Write(json, LoadedState.Caution, Cautions.Hands, Cautions.Energise);
    }

    private static void WriteState(Utf8JsonWriter json, string name, TankState s, IReadOnlyList<TapMove> moves)
    {
        json.WriteStartObject(name);
        json.Figure("secondary_hz", s.SecondaryHz);
        json.Figure("secondary_q", s.SecondaryQ);
        json.Figure("capacitor_for_tap_f", s.CapacitorF);
        json.Figure("tap_for_capacitor_turns", s.TapTurns);
        if (s.Drive is UntunedDrive d)
        {
            json.Figure("reactance_ohm", d.ReactanceOhm);
            json.Figure("triangle_peak_a", d.TrianglePeakA);
            json.Figure("reflected_ohm", d.ReflectedOhm);
            json.Figure("resonant_peak_a", d.ResonantPeakA);
            json.Figure("power_w", d.PowerW);
        }

        json.Objects("moves", moves, move =>
        {
            json.Figure("to_turns", move.ToTurns);
            json.Figure("along_mm", move.AlongM * 1e3);
            json.WriteString("direction", move.Direction);
            json.Figure("stray_h", move.StrayH);
            json.Figure("capacitor_f", move.CapacitorF);
        });
        json.WriteEndObject();
    }

    private static void WriteDrive(TankFigures t, Action<string, Func<TankState, string>> row)
    {
        row($"no tank capacitor, {Words.Plain(t.Primary.BusVoltageV!.Value)} V {(t.Primary.FullBridge ? "full" : "half")} bridge:", _ => "");
        row("  reactance of the primary", s => Words.Digits(s.Drive!.ReactanceOhm, 3) + " ohm");
        row("  peak current, no secondary", s => Words.Digits(s.Drive!.TrianglePeakA, 3) + " A");
        row("  Q of the secondary", s => Words.Number(s.SecondaryQ, 0));
        row("  reflected in resonance", s => Words.Digits(s.Drive!.ReflectedOhm, 3) + " ohm");
        row("  peak current in resonance", s => Words.Digits(s.Drive!.ResonantPeakA, 3) + " A");
        row("  power into the secondary", s => Words.Digits(s.Drive!.PowerW, 3) + " W");
    }

    private static void WriteMove(IAnsiConsole console, TankFigures t)
    {
        console.MarkupLineInterpolated($"The tank was read at {Words.Kilohertz(t.PrimaryReading!.F0Hz)} ({t.PrimaryReading.From}), tap at {Words.Number(t.Tap, 2)} turns.");
        foreach ((string state, IReadOnlyList<TapMove> moves) in (ReadOnlySpan<(string, IReadOnlyList<TapMove>)>)[("cold", t.ColdMoves), ("loaded", t.LoadedMoves)])
        {
            if (moves.Count == 0)
            {
                console.MarkupLineInterpolated($"  {state}: no tap on this winding does it.");
            }

            foreach (TapMove move in moves)
            {
                string cause = move.StrayH > 0
                    ? $"if leads and layout add {Words.Henry(move.StrayH)}"
                    : $"if the capacitor is {Words.Nanofarad(move.CapacitorF)}";
                console.MarkupLineInterpolated($"  {state}, {cause}: [bold]{move.Direction}[/], {Words.Number(Math.Abs(move.AlongM) * 100, 1)} cm along the conductor, to {Words.Number(move.ToTurns, 2)}.");
            }
        }

        if (t.ColdMoves.Count > 1)
        {
            console.MarkupLine("  The truth lies between the two views: move the smaller distance, and read again.");
        }
    }

    private static void WriteTaps(IAnsiConsole console, TankFigures t)
    {
        Table table = new Table().Border(TableBorder.Simple).AddColumns("turns", "L µH");
        if (t.Taps.Count > 0)
        {
            table.AddColumns("f kHz", "k", "Hz per cm");
        }

        foreach (TableColumn column in table.Columns)
        {
            column.RightAligned();
        }

        foreach (TapRow row in t.Taps)
        {
            table.AddRow(
                Words.Number(row.Turns, 2), Words.Digits(row.InductanceH * 1e6, 4), Words.Number(row.FrequencyHz / 1e3, 2),
                Words.Number(row.Coupling, 3), Words.Number(row.HzPerCentimetre, 0));
        }

        foreach ((double turns, double inductanceH) in t.Turns)
        {
            table.AddRow(Words.Number(turns, 2), Words.Digits(inductanceH * 1e6, 4));
        }

        console.Write(table);
    }
}
